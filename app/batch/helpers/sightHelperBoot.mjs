// Entry of a thread that makes sight rasters: makes TypeScript readable in it, then runs it.
import { register } from 'tsx/esm/api'

register()
await import('./sightHelper.ts')
