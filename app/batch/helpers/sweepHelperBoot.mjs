// Entry of a helper thread: makes TypeScript readable in it, then runs the helper.
import { register } from 'tsx/esm/api'

register()
await import('./sweepHelper.ts')
