import { useEffect, useState } from 'react'
import type { Drawing } from '../../../charts/index.ts'
import { svgOf } from '../../../charts/index.ts'
import { download } from '../../../files/index.ts'
import { Button } from '../../../ui/index.ts'
import { CHART_WORDS } from '../../../words/index.ts'

const SAID_MS = 2500
/** Copies a chart as it stands, as SVG in print colours or as a table; where the clipboard is closed the file is saved instead. */
export function CopyButtons({ name, drawing, csv }: { name: string; drawing: () => Drawing | null; csv: () => string | null }) {
  const [said, setSaid] = useState('')
  useEffect(() => {
    if (said === '') return
    const timer = setTimeout(() => setSaid(''), SAID_MS)
    return () => clearTimeout(timer)
  }, [said])
  const give = async (text: string | null, type: 'svg' | 'csv') => {
    if (text === null) return
    try {
      await navigator.clipboard.writeText(text)
      setSaid(CHART_WORDS.copied)
    } catch {
      download(new Blob([text], { type: type === 'svg' ? 'image/svg+xml' : 'text/csv' }), `${name}.${type}`)
      setSaid(CHART_WORDS.savedInstead)
    }
  }
  return (
    <span className="copy">
      <Button
        small
        look="quiet"
        onPress={() => {
          const shown = drawing()
          void give(shown && svgOf(shown, 'SourceSans, sans-serif'), 'svg')
        }}
      >
        {CHART_WORDS.copySvg}
      </Button>
      <Button small look="quiet" onPress={() => void give(csv(), 'csv')}>
        {CHART_WORDS.copyCsv}
      </Button>
      <span className="said" role="status">
        {said}
      </span>
    </span>
  )
}
