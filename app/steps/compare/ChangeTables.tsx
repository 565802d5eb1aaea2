import type { Change, FixChange } from '../../../core/index.ts'
import {
  CHANGE_WORDS,
  formatAngle,
  formatAreaDown,
  formatAreaUp,
  formatAzimuth,
  formatDbDown,
  formatFloor,
  formatMargin,
  formatMetPct,
  formatPlaceRange,
  formatSetting,
  NO_VALUE,
  pairWords,
  sectorWords,
  textOf,
  toFace,
  type UnitSystem,
  unitOf,
  verdictOf,
} from '../../words/index.ts'

/** What a change comes to: needs, fixes, sectors of the horizon, ground and floors. */
export function ChangeTables({ change, system, words }: { change: Change; system: UnitSystem; words: string }) {
  const area = (km2: number | null, format: typeof formatAreaUp) => (km2 === null ? NO_VALUE : textOf(format(km2, system)))
  const sectors = [...change.risen, ...change.fallen]
  return (
    <div className="change-tables" aria-live="polite">
      <p>
        <b>{words}</b>
      </p>
      <h4>{CHANGE_WORDS.needs}</h4>
      <table className="table">
        <caption className="visually-hidden">{CHANGE_WORDS.needs}</caption>
        <thead>
          <tr>
            <th scope="col">Need</th>
            <th scope="col" className="text">
              verdict
            </th>
            <th scope="col">in sight</th>
            <th scope="col">detectable</th>
            <th scope="col">usable</th>
            <th scope="col">worst height margin</th>
            <th scope="col">worst signal margin</th>
            <th scope="col">gains</th>
            <th scope="col">loses</th>
          </tr>
        </thead>
        <tbody>
          {change.needs.map((n) => {
            const [was, is] = [verdictOf(n.met.before), verdictOf(n.met.after)]
            return (
              <tr key={n.needId}>
                <td className="need">{n.name}</td>
                <td className="text">{was === is ? is : `${was} → ${is}`}</td>
                <td>{pairWords(n.inSightPct, (v) => formatMetPct(v))}</td>
                <td>{pairWords(n.detectablePct, (v) => formatMetPct(v))}</td>
                <td>{pairWords(n.usablePct, (v) => formatMetPct(v))}</td>
                <td>{pairWords(n.worstMarginM, (v) => formatMargin(v, system))}</td>
                <td>{pairWords(n.worstSignalDb, (v) => formatDbDown(v))}</td>
                <td>{area(n.gainedKm2, formatAreaDown)}</td>
                <td>{area(n.lostKm2, formatAreaUp)}</td>
              </tr>
            )
          })}
        </tbody>
      </table>
      <h4>{CHANGE_WORDS.fixes}</h4>
      {change.fixes.length === 0 ? <p className="ink-2">{CHANGE_WORDS.noFixes}</p> : <Fixes fixes={change.fixes} system={system} />}
      <h4>{CHANGE_WORDS.sectors}</h4>
      {sectors.length === 0 ? (
        <p className="ink-2">{CHANGE_WORDS.noSectors}</p>
      ) : (
        <ul className="sectors">
          {sectors.map((s) => (
            <li key={`${s.fromDeg} ${s.mostDeg}`}>{sectorWords(s, system)}</li>
          ))}
        </ul>
      )}
      <h4>{CHANGE_WORDS.ground}</h4>
      <dl className="pairs">
        <Pair label="Ground in sight" value={pairWords(change.groundInSightKm2, (v) => formatAreaDown(v, system))} />
        <Pair label="C/N over 40 dB" value={pairWords(change.clutterOver40Km2, (v) => formatAreaUp(v, system))} />
        <Pair label="Clutter comes or grows by 3 dB and more" value={area(change.clutterMoreKm2, formatAreaUp)} />
        <Pair label="Clutter goes or falls by 3 dB and more" value={area(change.clutterLessKm2, formatAreaDown)} />
        {change.floors.map((f) => (
          <Pair
            key={f.rangeM}
            label={`Floor at ${textOf(formatSetting(toFace('range', f.rangeM, system), unitOf('range', system), 0))}, worst`}
            value={pairWords(f.worstM, (v) => formatFloor(v, system))}
          />
        ))}
        <Pair
          label="Null spacing of two rays over level ground, λ/2h"
          value={pairWords(change.nullSpacingDeg, (v) => formatAngle(v, 0.01))}
        />
      </dl>
    </div>
  )
}

function Pair({ label, value }: { label: string; value: string }) {
  return (
    <div>
      <dt>{label}</dt>
      <dd>{value}</dd>
    </div>
  )
}

function Fixes({ fixes, system }: { fixes: readonly FixChange[]; system: UnitSystem }) {
  return (
    <table className="table">
      <caption className="visually-hidden">{CHANGE_WORDS.fixes}</caption>
      <thead>
        <tr>
          <th scope="col">Fix</th>
          <th scope="col">azimuth</th>
          <th scope="col">range</th>
          <th scope="col">floor</th>
          <th scope="col">altitude lost</th>
          <th scope="col" className="text">
            usable
          </th>
          <th scope="col" className="text">
            behind
          </th>
        </tr>
      </thead>
      <tbody>
        {fixes.map((f) => {
          const [was, is] = [f.before.usable, f.after.usable].map((u) => (u ? 'usable' : 'not usable'))
          return (
            <tr key={`${f.needId} ${f.name} ${f.azimuthDeg}`}>
              <td className="need">{f.name}</td>
              <td>{textOf(formatAzimuth(f.azimuthDeg))}</td>
              <td>{textOf(formatPlaceRange(f.rangeM, system))}</td>
              <td>{pairWords({ before: f.before.floorM, after: f.after.floorM }, (v) => formatFloor(v, system))}</td>
              <td>{f.floorRiseM === null ? NO_VALUE : textOf(formatFloor(f.floorRiseM, system))}</td>
              <td className="text">{was === is ? is : `${was} → ${is}`}</td>
              <td className="text">{f.after.obstacle}</td>
            </tr>
          )
        })}
      </tbody>
    </table>
  )
}
