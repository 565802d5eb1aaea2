import type { StudyDoc } from '../../../core/index.ts'
import { hasStartingRadar, setField, valueAt } from '../../document/index.ts'
import { Button, Check, CommitField, Mark } from '../../ui/index.ts'
import {
  CIRCULAR_FIELDS,
  COSECANT_FIELD,
  DETECTORS,
  DWELLS_FIELD,
  ELEVATION_PATTERNS,
  FILTER_WINDOWS,
  GAS_KINDS,
  MOTION_FIELDS,
  POLARISATIONS,
  PRF_MODES,
  RADAR_FIELDS,
  STC_FIELDS,
  STC_KINDS,
  SUPPRESSION_FIELDS,
  SUPPRESSION_KINDS,
  TABLE_WORDS,
} from '../../words/index.ts'
import { sentenceOf, useDoc, useSession } from '../session/index.ts'
import { EarthFactorHelper } from './EarthFactorHelper.tsx'
import { DocChoice, DocNumber, DocNumbers, Folded, Group, OriginMark } from './fields.tsx'
import { PairsField } from './PairsField.tsx'
import { Problems } from './Problems.tsx'
import { Remarks } from './Remarks.tsx'

const HZ = { unit: 'Hz', size: 1 }

/** Every field of the radar, of the air it works in and of the polar grid. */
export function RadarStep() {
  const { study, view, radars, notices } = useSession()
  const name = useDoc((d) => d.radar.name ?? '')
  const coherent = useDoc((d) => d.radar.coherentTransmitter)
  const pattern = useDoc((d) => d.radar.antenna.elevationPattern ?? 'gaussian')
  const suppression = useDoc((d) => d.radar.suppression?.kind ?? 'none')
  const dwells = useDoc((d) => d.radar.prfMode === 'dwellStagger')
  const circular = useDoc((d) => d.radar.polarisation === 'circular')
  const stc = useDoc((d) => d.radar.stc?.kind ?? 'none')
  const detector = useDoc((d) => d.radar.detector)
  const stated = useDoc(statedPaths)
  const tables = [useDoc((d) => d.radar.pulses?.length ?? 0), useDoc((d) => d.radar.beams?.length ?? 0)]
  const named = useDoc((d) => !hasStartingRadar(d) && (d.radar.name ?? '') !== '')
  const doc = useDoc((d) => d.radar)
  return (
    <>
      <div className="row">
        <Button small onPress={() => view.getState().set({ dialog: 'templates' })}>
          Start from…
        </Button>
        <Button
          small
          look="quiet"
          disabled={!named}
          onPress={() =>
            void radars
              .getState()
              .keep(doc)
              .then(() => notices.getState().say(`${doc.name} is kept for other studies on this machine`))
              .catch((error) => notices.getState().say(sentenceOf(error), 'bad'))
          }
        >
          Keep this radar
        </Button>
      </div>
      <CommitField
        label="Name"
        text={name}
        shape="wide"
        onCommit={(text) => {
          setField(study, 'radar.name', text.trim() || undefined, 'renamed the radar')
          return null
        }}
      />
      <Problems where={(path) => /^(radar|atmosphere|run)\b/.test(path)} />
      <Remarks about={['radar', 'atmosphere', 'run']} />
      <Group title="Transmitter">
        {RADAR_FIELDS.transmitter.map((f) => (
          <DocNumber key={f.path} of={f} />
        ))}
        <DocNumbers path="radar.prfHz" label="PRF" face={HZ} required />
        <DocChoice path="radar.prfMode" label="PRF change" choices={PRF_MODES} fallback="single" />
        {dwells && <DocNumber of={DWELLS_FIELD} />}
        <Check value={coherent ?? false} onChange={(v) => setField(study, 'radar.coherentTransmitter', v, 'changed coherence')}>
          Coherent transmitter {coherent === undefined ? <Mark>default</Mark> : <OriginMark path="radar.coherentTransmitter" />}
        </Check>
      </Group>
      <Group title="Antenna">
        {RADAR_FIELDS.antenna.slice(0, 3).map((f) => (
          <DocNumber key={f.path} of={f} />
        ))}
        <DocChoice path="radar.antenna.elevationPattern" label="Elevation pattern" choices={ELEVATION_PATTERNS} fallback="gaussian" />
        {pattern === 'cosecant-squared' ? <DocNumber of={COSECANT_FIELD} /> : null}
        {pattern === 'table' ? (
          <PairsField
            path="radar.antenna.elevationTable"
            label="Pattern: degrees from the beam axis, dB below peak"
            first={{ unit: '°', size: 1 }}
            example={'−5  −13\n0  0\n5  −6'}
          />
        ) : null}
        {RADAR_FIELDS.antenna.slice(3).map((f) => (
          <DocNumber key={f.path} of={f} />
        ))}
        <DocChoice path="radar.polarisation" label="Polarisation" choices={POLARISATIONS} fallback="V" />
        {circular ? CIRCULAR_FIELDS.map((f) => <DocNumber key={f.path} of={f} />) : null}
      </Group>
      <Group title="Receiver">
        {RADAR_FIELDS.receiver.map((f) => (
          <DocNumber key={f.path} of={f} />
        ))}
      </Group>
      <Folded
        title="Detector and receiver limits"
        open={RADAR_FIELDS.processing.some((f) => stated.includes(f.path)) || detector !== undefined}
      >
        <DocChoice path="radar.detector" label="Threshold" choices={DETECTORS} fallback="noise" />
        {RADAR_FIELDS.processing.map((f) => (
          <DocNumber key={f.path} of={f} />
        ))}
      </Folded>
      <Folded title={TABLE_WORDS.pulsesTitle} open={tables.some((n) => n > 0)}>
        <div className="row add">
          <Button small onPress={() => view.getState().set({ dialog: 'pulses' })}>
            Edit tables
          </Button>
          <span className="small ink-3">
            {tables.some((n) => n > 0) ? `pulses: ${Math.max(1, tables[0])}, beams: ${Math.max(1, tables[1])}` : 'one pulse, one beam'}
          </span>
        </div>
      </Folded>
      <Group title="Clutter suppression">
        <DocChoice
          path="radar.suppression.kind"
          label="Kind"
          choices={SUPPRESSION_KINDS}
          fallback="none"
          onChange={(kind) => {
            const kept = (valueAt(study.getState().doc, 'radar.suppression') ?? {}) as object
            const stated = kind === 'stated' ? { statedDb: 30, ...kept } : kept
            setField(study, 'radar.suppression', { ...stated, kind }, 'changed suppression')
          }}
        />
        {suppression === 'stated' ? SUPPRESSION_FIELDS.stated.map((f) => <DocNumber key={f.path} of={f} />) : null}
        {suppression === 'canceller' || suppression === 'filterBank'
          ? SUPPRESSION_FIELDS.canceller.map((f) => <DocNumber key={f.path} of={f} />)
          : null}
        {suppression === 'filterBank' ? (
          <DocChoice path="radar.suppression.window" label="Filter window" choices={FILTER_WINDOWS} fallback="hamming" />
        ) : null}
      </Group>
      <Group title="Short-range sensitivity (STC)">
        <DocChoice
          path="radar.stc.kind"
          label="Kind"
          choices={STC_KINDS}
          fallback="none"
          onChange={(kind) => {
            const kept = (valueAt(study.getState().doc, 'radar.stc') ?? {}) as object
            const start =
              kind === 'curve'
                ? {
                    curve: [
                      [0, 40],
                      [20_000, 0],
                    ],
                  }
                : kind === 'rtoFourth'
                  ? { cornerM: 20_000, maxDb: 40 }
                  : {}
            setField(study, 'radar.stc', { ...start, ...kept, kind }, 'changed STC')
          }}
        />
        {stc === 'rtoFourth' ? STC_FIELDS.map((f) => <DocNumber key={f.path} of={f} />) : null}
        {stc === 'curve' ? (
          <PairsField path="radar.stc.curve" label="Curve: slant range, attenuation dB" first="range" example={'0  40\n10  0'} />
        ) : null}
      </Group>
      <Group title="Air and earth">
        {RADAR_FIELDS.air.map((f) => (
          <DocNumber key={f.path} of={f} />
        ))}
        <DocChoice path="atmosphere.gas" label="Gas loss" choices={GAS_KINDS} fallback="none" />
      </Group>
      <Folded title="k from the air at the ground" open={false}>
        <EarthFactorHelper />
      </Folded>
      <Folded title="How sea and rain move" open={MOTION_FIELDS.some((f) => stated.includes(f.path))}>
        {MOTION_FIELDS.map((f) => (
          <DocNumber key={f.path} of={f} />
        ))}
      </Folded>
      <Group title="Polar grid">
        {RADAR_FIELDS.grid.map((f) => (
          <DocNumber key={f.path} of={f} />
        ))}
      </Group>
    </>
  )
}

/** Which of the folded fields the study states, as one text: the form renders again only when that changes. */
const statedPaths = (doc: StudyDoc): string =>
  [...RADAR_FIELDS.processing, ...MOTION_FIELDS]
    .map((f) => f.path)
    .filter((path) => valueAt(doc, path) != null)
    .join(' ')
