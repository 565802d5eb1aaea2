import { problemsOf, withValue } from '../../document/index.ts'
import { Button } from '../../ui/Button.tsx'
import { CIRCULAR_FIELDS, COSECANT_FIELD, MOTION_FIELDS, RADAR_FIELDS, STC_FIELDS, SUPPRESSION_FIELDS } from '../../words/index.ts'
import { useDoc, useSession } from '../session/index.ts'

/** Fields that say themselves what is wrong with them. */
const IN_PLACE = new Set([
  ...[RADAR_FIELDS, SUPPRESSION_FIELDS].flatMap((groups) => Object.values(groups).flat()).map((f) => f.path),
  ...[...STC_FIELDS, ...MOTION_FIELDS, ...CIRCULAR_FIELDS].map((f) => f.path),
  COSECANT_FIELD.path,
  'radar.prfHz',
])
const MISSPELT = 'misspelt-key'

/** Values of the study that have to change and have no field that says so; a key nobody knows can be dropped. */
export function Problems({ where }: { where: (path: string) => boolean }) {
  const { study } = useSession()
  const problems = useDoc(problemsOf).filter((p) => where(p.path) && !IN_PLACE.has(p.path))
  return problems.map((p) => (
    <p key={p.path + p.code} className="problem" role="alert">
      <b>{p.path}</b> {p.found}; {p.remedy}
      {p.code === MISSPELT ? (
        <Button small onPress={() => study.getState().edit(`dropped ${p.path}`, (d) => withValue(d, p.path, undefined))}>
          Drop the key
        </Button>
      ) : null}
    </p>
  ))
}
