import { ProgressBar as AriaProgressBar } from 'react-aria-components'
import { formatDuration } from '../words/index.ts'
import { Button } from './Button.tsx'

export interface ProgressBarProps {
  readonly doing: string
  readonly done: number
  readonly total: number
  readonly secondsLeft: number | null
  readonly onStop?: () => void
}
/** Long work: what is done, how far, time left, and a way to stop it. */
export function ProgressBar({ doing, done, total, secondsLeft, onStop }: ProgressBarProps) {
  const pct = total > 0 ? Math.min(100, (100 * done) / total) : 0
  return (
    <AriaProgressBar className="progress" value={pct} aria-label={doing}>
      <span className="ink-2">
        {doing}
        {secondsLeft === null ? '' : <span className="ink-3"> · {formatDuration(secondsLeft)} left</span>}
      </span>
      {onStop ? (
        <Button small onPress={onStop}>
          Stop
        </Button>
      ) : (
        <span />
      )}
      <div className="track">
        <div className="bar" style={{ width: `${pct}%` }} />
      </div>
    </AriaProgressBar>
  )
}
