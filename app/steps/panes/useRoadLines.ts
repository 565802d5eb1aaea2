import { useEffect, useState } from 'react'
import type { OptionRef, RoadLines } from '../../../core/index.ts'
import { optionKey } from '../../document/index.ts'
import { useGround, useResults, useSession } from '../session/index.ts'

/** Roads whose vehicles the option on show sees, apart from the others; null while not worked out. */
export function useRoadLines(option: OptionRef | null): RoadLines | null {
  const { client } = useSession()
  const some = useGround((g) => g.roads.length > 0)
  const figure = useResults((r) => (option ? (r.byOption.get(optionKey(option))?.figures.roads ?? null) : null))
  const [lines, setLines] = useState<{ figure: object; lines: RoadLines | null } | null>(null)
  useEffect(() => {
    if (!some || !figure || !option) return
    let here = true
    client.ask('roads', { option }).then(
      (answer) => here && setLines({ figure, lines: answer }),
      () => {},
    )
    return () => {
      here = false
    }
  }, [client, some, figure, option])
  return lines !== null && lines.figure === figure ? lines.lines : null
}
