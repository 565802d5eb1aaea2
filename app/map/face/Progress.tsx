import { Button, ProgressBar } from 'react-aria-components'
import { formatDuration, MAP_WORDS } from '../../words/index.ts'
import type { RunProgress } from '../types.ts'

/** What runs, how far, time left, and Stop. */
export function Progress({ progress, onStop }: { progress: RunProgress; onStop: () => void }) {
  const pct = progress.total > 0 ? Math.min(100, (100 * progress.done) / progress.total) : 0
  return (
    <ProgressBar className="map-card run" value={pct} aria-label={progress.doing}>
      <span className="doing">
        {progress.doing}
        {progress.secondsLeft === null ? null : (
          <span className="ink-3">
            {' · '}
            {formatDuration(progress.secondsLeft)} {MAP_WORDS.left}
          </span>
        )}
      </span>
      <Button className="button quiet small" onPress={onStop}>
        {MAP_WORDS.stop}
      </Button>
      <span className="track">
        <span className="bar" style={{ width: `${pct}%` }} />
      </span>
    </ProgressBar>
  )
}
