import type { TerrainFileDoc } from '../../../core/index.ts'
import { setField } from '../../document/index.ts'
import { takeOut } from '../../files/index.ts'
import { Button, Caution, CommitField, Notice, NumberField, ProgressBar, Select } from '../../ui/index.ts'
import {
  CAUTIONS,
  EMPTY_WORDS,
  formatBytes,
  formatHeight,
  formatNumber,
  HEIGHT_UNITS,
  LEGENDS,
  METRES,
  TERRAIN_CHOICES,
  textOf,
} from '../../words/index.ts'
import { useDoc, useGround, useSession, useView } from '../session/index.ts'
import { ClassTable } from './ClassTable.tsx'
import { DocChoice, Folded, Group } from './fields.tsx'
import { Problems } from './Problems.tsx'
import { Remarks } from './Remarks.tsx'
import { useFilePicker } from './useFilePicker.tsx'

/** Terrain, land cover, obstacles and roads: what was given, what was read, what has to be stated. */
export function GroundStep() {
  const terrain = useDoc((d) => d.terrain)
  const { state, reading, trouble, notes, obstacles, roads } = useGround((g) => g)
  return (
    <>
      <Problems where={(path) => !/^(radar|atmosphere|run|needs|candidates)\b/.test(path)} />
      {terrain.length === 0 ? <NoTerrain /> : null}
      {state === 'failed' ? (
        <Notice tone="bad" title="The ground could not be read">
          {trouble}
        </Notice>
      ) : null}
      {reading ? <ProgressBar doing={reading.doing} done={reading.done} total={reading.total} secondsLeft={null} /> : null}
      {terrain.length > 0 ? (
        <Group title="Terrain">
          {terrain.map((t, i) => (
            <TerrainFile key={t.file} file={t} at={i} />
          ))}
          <AddFile what="terrain" words="Add terrain" />
        </Group>
      ) : null}
      {state === 'ready' ? <WhatWasRead notes={notes} /> : null}
      <Remarks about={['terrain', 'landCover', 'facades', 'obstacles', 'roads', 'tables']} />
      {terrain.length > 0 ? (
        <>
          <LandCover />
          <Group title="Obstacles">
            <OneFile path="obstacles" words="Add obstacles" count={obstacles.length} noun="obstacle" />
            <ObstacleTable />
          </Group>
          <Group title="Roads">
            <OneFile path="roads" words="Add roads" count={roads.length} noun="road" />
          </Group>
          <LandTable />
        </>
      ) : null}
    </>
  )
}

function NoTerrain() {
  const session = useSession()
  const picker = useFilePicker()
  const words = EMPTY_WORDS.ground
  return (
    <div className="empty">
      <h3>{words.title}</h3>
      <p className="ink-2">
        {words.action}. {words.reason}; files stay on this machine.
      </p>
      <div className="row">
        <Button onPress={picker.open}>Pick files</Button>
        <Button onPress={() => void session.openDemo()}>Open the demo study</Button>
        <Button onPress={() => session.view.getState().set({ dialog: 'templates' })}>Start from a kind of work</Button>
      </div>
      {picker.input}
    </div>
  )
}

function WhatWasRead({ notes }: { notes: readonly string[] }) {
  const ground = useGround((g) => g.ground)
  const system = useView((v) => v.units)
  if (!ground) return null
  return (
    <Group title="What was read">
      {notes.map((n) => (
        <p key={n} className="ink-2">
          {n}
        </p>
      ))}
      <p className="ink-2">
        Ground {textOf(formatHeight(ground.minM, system))} to {textOf(formatHeight(ground.maxM, system))} MSL
        {ground.voidPct > 0 ? `, ${ground.voidPct < 0.1 ? '< 0.1' : formatNumber(ground.voidPct, 1)} % without data` : ''}
      </p>
      <Caution>{CAUTIONS.nearMast}</Caution>
    </Group>
  )
}

/** A file of the study with its size, or that it is missing, and a way to take it out. */
function FileHead({ file, children }: { file: string; children?: React.ReactNode }) {
  const session = useSession()
  const missing = useGround((g) => g.missing.includes(file))
  const size = session.files.getState().files.get(file)?.blob.size
  return (
    <div className="file">
      <span className="file-name" title={file}>
        {file} <span className="ink-3 small">{size === undefined ? '' : formatBytes(size)}</span>
      </span>
      <Button
        small
        look="quiet"
        label={`Take out ${file}`}
        onPress={() => session.study.getState().edit(`took out ${file}`, (d) => takeOut(d, file))}
      >
        take out
      </Button>
      {missing ? <span className="more mark">not here: drop {file} on the page</span> : null}
      {children}
    </div>
  )
}

function TerrainFile({ file, at }: { file: TerrainFileDoc; at: number }) {
  const { study } = useSession()
  const path = `terrain[${at}]`
  return (
    <div>
      <FileHead file={file.file} />
      <Select
        label="Height unit"
        value={file.unit ?? 'file'}
        choices={HEIGHT_UNITS}
        onChange={(unit) => setField(study, `${path}.unit`, unit === 'file' ? undefined : unit, `stated the unit of ${file.file}`)}
      />
      <CommitField
        label="CRS"
        text={file.crs ?? ''}
        shape="long"
        placeholder="as the file says"
        onCommit={(text) => {
          setField(study, `${path}.crs`, text.trim() || undefined, `stated the CRS of ${file.file}`)
          return null
        }}
      />
      <NumberField
        label="Height error, 90 %"
        value={file.verticalErrorM}
        fallback={10}
        face={METRES}
        limit={{ what: 'height error', unit: 'm', low: 0, high: 1000 }}
        onCommit={(v) => setField(study, `${path}.verticalErrorM`, v, `changed the height error of ${file.file}`)}
      />
    </div>
  )
}

function LandCover() {
  const cover = useDoc((d) => d.landCover)
  const uniform = useDoc((d) => d.uniformTerrain)
  const { study } = useSession()
  return (
    <Group title="Land cover">
      {cover ? (
        <>
          <FileHead file={cover.file} />
          <Select
            label="Legend"
            value={cover.legend}
            choices={LEGENDS}
            onChange={(legend) => setField(study, 'landCover.legend', legend, 'changed the legend')}
          />
          <ClassTable />
        </>
      ) : (
        <>
          <DocChoice path="uniformTerrain" label="Uniform terrain" choices={TERRAIN_CHOICES} fallback="rural" />
          <AddFile what="landCover" words="Add land cover" />
          {uniform === undefined ? <Caution>{CAUTIONS.coverDefault}</Caution> : null}
        </>
      )}
    </Group>
  )
}

function OneFile({ path, words, count, noun }: { path: 'obstacles' | 'roads'; words: string; count: number; noun: string }) {
  const file = useDoc((d) => d[path]?.file)
  if (!file) return <AddFile what={path} words={words} />
  return (
    <>
      <FileHead file={file} />
      {count > 0 ? (
        <p className="ink-2">
          {count} {noun}
          {count > 1 ? 's' : ''}
        </p>
      ) : null}
    </>
  )
}

function ObstacleTable() {
  const { view } = useSession()
  const given = useDoc((d) => d.obstacles !== undefined)
  return (
    <div className="row">
      <Button small onPress={() => view.getState().set({ dialog: 'obstacles' })}>
        {given ? 'Edit as a table' : 'Enter obstacles'}
      </Button>
    </div>
  )
}

/** Clutter strength from the user's own table in place of the built-in one. */
function LandTable() {
  const file = useDoc((d) => d.tables?.lowAngleLand)
  return (
    <Folded title="Own table of land clutter" open={file !== undefined}>
      {file ? <FileHead file={file} /> : <AddFile what="landTable" words="Add a table" />}
    </Folded>
  )
}

function AddFile({ what, words }: { what: 'terrain' | 'landCover' | 'obstacles' | 'roads' | 'landTable'; words: string }) {
  const picker = useFilePicker(
    what,
    what === 'terrain' || what === 'landCover' ? '.tif,.tiff' : what === 'landTable' ? '.json' : '.geojson,.json',
  )
  return (
    <div className="row add">
      <Button small onPress={picker.open}>
        {words}
      </Button>
      {what === 'terrain' ? null : <span className="ink-3 small">optional</span>}
      {picker.input}
    </div>
  )
}
