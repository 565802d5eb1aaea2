import { setField } from '../../document/index.ts'
import { NumberField, Select } from '../../ui/index.ts'
import { METRES, TERRAIN_CHOICES } from '../../words/index.ts'
import { useDoc, useSession } from '../session/index.ts'

const COVER_LIMIT = { what: 'cover height', unit: 'm', low: 0, high: 150 }

/** Classes the user has stated: number, terrain, cover height. Others follow the legend's own defaults. */
export function ClassTable() {
  const { study } = useSession()
  const classes = useDoc((d) => d.landCover?.classes)
  const rows = Object.entries(classes ?? {})
  const add = (id: string) => setField(study, `landCover.classes.${id}`, { terrain: 'rural', coverHeightM: 0 }, `stated class ${id}`)
  return (
    <>
      {rows.map(([id, row]) => (
        <div key={id} className="class-row">
          <span className="ink-2">{id}</span>
          <Select
            label=""
            hideLabel
            ariaLabel={`Terrain of class ${id}`}
            value={row.terrain}
            choices={TERRAIN_CHOICES}
            onChange={(terrain) => setField(study, `landCover.classes.${id}.terrain`, terrain, `changed class ${id}`)}
          />
          <NumberField
            label=""
            hideLabel
            ariaLabel={`Cover height of class ${id}, m`}
            shape="wide"
            value={row.coverHeightM}
            required
            face={METRES}
            limit={COVER_LIMIT}
            onCommit={(v) => setField(study, `landCover.classes.${id}.coverHeightM`, v, `changed class ${id}`)}
          />
        </div>
      ))}
      <NumberField
        label="State a class"
        value={undefined}
        face={{ unit: '', size: 1 }}
        limit={{ what: 'class number', unit: '', low: 0, high: 65_535, whole: true }}
        onCommit={(v) => v !== undefined && add(String(v))}
      />
    </>
  )
}
