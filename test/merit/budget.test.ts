import { execFileSync } from 'node:child_process'
import { createRequire } from 'node:module'
import { join } from 'node:path'
import { expect, it } from 'vitest'

interface Measured {
  readonly options: number
  readonly needsChangedMs: readonly number[]
  readonly fullOverBase: readonly number[]
}

it('the demo keeps its budgets: 24 options after a change of needs, full physics against masking and clutter alone', () => {
  const tsx = createRequire(import.meta.url).resolve('tsx')
  const printed = execFileSync(process.execPath, ['--import', tsx, join(import.meta.dirname, 'budgetRun.ts')], { encoding: 'utf8' })
  const { options, needsChangedMs, fullOverBase }: Measured = JSON.parse(printed.trim().split('\n').at(-1) as string)
  const list = (values: readonly number[], digits: number) => values.map((v) => v.toFixed(digits)).join(', ')
  console.log(
    `24 options after a change of both needs: ${list(needsChangedMs, 0)} ms; full over base: ${list(fullOverBase, 2)} (processor time)`,
  )
  // eight heights × three tilts, both needs changed: under 3 s
  expect(options).toBe(24)
  expect(Math.min(...needsChangedMs)).toBeLessThan(3000)
  // one option with cover at k = 1, levels, needs: at most twice masking and C/N
  expect(Math.min(...fullOverBase)).toBeLessThanOrEqual(2)
}, 300_000)
