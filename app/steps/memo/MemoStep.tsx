import { CAUTIONS } from '../../words/index.ts'

export function MemoStep() {
  return <p className="ink-2">{CAUTIONS.draft}</p>
}
