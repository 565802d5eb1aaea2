/** `npm run demo`: writes the demo study into public/demo. */
import { mkdirSync, writeFileSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { demoFiles } from './demoFiles.ts'

const folder = join(dirname(fileURLToPath(import.meta.url)), '../../public/demo')
mkdirSync(folder, { recursive: true })
process.stderr.write('wearing down the island, about half a minute …\n')
for (const [name, content] of await demoFiles()) {
  writeFileSync(join(folder, name), content)
  process.stderr.write(`${name}: ${Math.ceil(content.length / 1024)} kB\n`)
}
