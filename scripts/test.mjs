// `npm test`: types, lint, unit, reference and browser tests; the last line is `N passed, N failed`.
import { spawnSync } from 'node:child_process'
import { readFileSync, rmSync } from 'node:fs'
import { findChromium } from './findChromium.mjs'

let passed = 0
let failed = 0
const run = (command, args, env = {}) => spawnSync(command, args, { stdio: 'inherit', env: { ...process.env, ...env } }).status === 0
const step = (name, ok) => {
  if (ok) passed++
  else failed++
  console.log(`--- ${name}: ${ok ? 'ok' : 'FAILED'}`)
}
const report = (path) => {
  try {
    return JSON.parse(readFileSync(path, 'utf8'))
  } catch {
    return null
  }
}
step('types', run('npm', ['run', '--silent', 'types']))
step('lint', run('npm', ['run', '--silent', 'lint']))
rmSync('test-results', { recursive: true, force: true })
for (const project of ['unit', 'reference']) {
  const out = `test-results/${project}.json`
  run('npx', ['vitest', 'run', '--project', project, '--reporter=default', '--reporter=json', `--outputFile.json=${out}`])
  const r = report(out)
  if (!r || r.numTotalTests === 0) step(project, false)
  else {
    passed += r.numPassedTests
    failed += r.numFailedTests + (r.numFailedTests === 0 && !r.success ? 1 : 0)
  }
}
const chromium = await findChromium({ install: true })
if (!chromium) {
  console.error('No Chromium: set CHROMIUM_PATH to one, then run npm test again.')
  step('browser', false)
} else {
  step('build', run('npm', ['run', '--silent', 'build']))
  const out = 'test-results/e2e.json'
  run('npx', ['playwright', 'test'], { CHROMIUM_PATH: chromium, PLAYWRIGHT_JSON_OUTPUT_NAME: out })
  const r = report(out)
  if (!r) step('browser', false)
  else {
    passed += r.stats.expected + r.stats.flaky
    failed += r.stats.unexpected
    if (r.stats.expected === 0) failed++
  }
}
console.log(`${passed} passed, ${failed} failed`)
process.exit(failed === 0 ? 0 : 1)
