// `npm start`: builds the app and serves the production build on a fixed port with the isolation headers.
import { build, preview } from 'vite'

await build({ logLevel: 'warn' })
const server = await preview({ preview: { port: Number(process.env.PORT ?? 4173), strictPort: true } })
console.log(`Sightfell is ready at ${server.resolvedUrls?.local[0] ?? 'http://127.0.0.1:4173/'} (opens the demo study; Ctrl-C stops it)`)
