import { Button } from '../../ui/Button.tsx'
import { formatDuration } from '../../words/index.ts'
import { useMemoExport } from '../memo/useMemoExport.ts'
import { useGround, useResults, useSession, useView } from '../session/index.ts'

/** Reading files, writing the memo, or computing: the one that holds the others up. */
function useWork() {
  const status = useResults((r) => r.status)
  const reading = useGround((g) => g.reading)
  const hold = useView((v) => v.hold)
  const { progress } = useMemoExport()
  if (reading) return { ...reading, secondsLeft: null, canStop: false }
  if (progress) return { doing: 'writing the memo', ...progress, secondsLeft: null, canStop: false }
  return status && !hold ? { ...status, canStop: true } : null
}

/** How far the work is, along the foot of the top bar. */
export function RunLine() {
  const work = useWork()
  if (!work) return null
  const share = work.total > 0 ? Math.min(1, work.done / work.total) : 0
  return <span className="run-line" style={{ width: `${100 * share}%` }} />
}

/** What runs, time left, and Stop; or Run while edits are held back. Stands at the foot of the index. */
export function Working() {
  const session = useSession()
  const hold = useView((v) => v.hold)
  const work = useWork()
  if (!work && !hold) return null
  return (
    <div className="working" role="status" aria-live="off">
      {work ? (
        <>
          <span>{work.doing}</span>
          {work.secondsLeft !== null && work.secondsLeft >= 1 ? (
            <span className="ink-3">{formatDuration(work.secondsLeft)} left</span>
          ) : null}
          {work.canStop ? (
            <Button small onPress={session.stop}>
              Stop
            </Button>
          ) : null}
        </>
      ) : (
        <>
          <span>Held: changes wait</span>
          <Button small onPress={session.run}>
            Run
          </Button>
        </>
      )}
    </div>
  )
}
