import { renderToStaticMarkup } from 'react-dom/server'
import { describe, expect, it } from 'vitest'
import { MemoColumn } from '../../app/memo/MemoColumn.tsx'
import { buildMemo } from '../../app/memo/model/index.ts'
import { CAUTIONS } from '../../app/words/index.ts'
import { sampleMemo } from './sampleMemo.ts'

const option = { candidate: 'B', heightM: 24, tiltDeg: 1.5 }
const model = buildMemo(sampleMemo('nautical', 40), option)
const html = renderToStaticMarkup(<MemoColumn model={model} option={option} onExplain={() => undefined} />)

describe('the memo column', () => {
  it('opens with the finding of the option, in the words of the PDF', () => {
    const own = model.sections.find((s) => s.id === 'option-B-24-1.5')!
    expect(html).toContain(own.finding!.replaceAll("'", '&#x27;'))
  })
  it('gives in sight, detectable and usable together, at both k', () => {
    for (const head of ['In sight, %', 'Detectable, %', 'Usable, %', 'At k = 1, the same, %']) expect(html).toContain(`<dt>${head}</dt>`)
  })
  it('makes every number with a figure behind it a button', () => {
    expect(html).toMatch(/<button[^>]*class="memo-number"[^>]*>[^<]*<span class="unit">/)
    expect(html.match(/class="memo-number"/g)!.length).toBeGreaterThan(20)
  })
  it('keeps the cautions with the numbers, in full', () => {
    for (const id of ['landTable', 'threeWords', 'meanUsable', 'headlineK', 'floorBand', 'nearMast'] as const)
      expect(html).toContain(CAUTIONS[id].replaceAll('"', '&quot;').replaceAll("'", '&#x27;'))
  })
  it('says so where the option is not computed yet', () => {
    const none = renderToStaticMarkup(<MemoColumn model={model} option={{ candidate: 'B', heightM: 99, tiltDeg: 0 }} />)
    expect(none).toContain('This option is not computed yet.')
  })
})
