import { MAX_POLAR_CELLS } from '../polar/index.ts'
import { SPEED_OF_LIGHT_MS } from '../units/index.ts'
import { checkConfirmations } from './checkConfirmations.ts'
import { checkPulses, shortestPulseS } from './checkPulses.ts'
import { cellsOf, defaultAzimuthStepDeg, evenStepDeg, gateOfM, longestRangeStepM } from './grid.ts'
import { quantity } from './limits.ts'
import type { Problem } from './problems.ts'
import type { CandidateDoc, NeedDoc, RadarDoc, RankingDoc, RunDoc, StudyDoc, TerrainFileDoc } from './types.ts'

/** Largest filter bank that is worked out. */
const MOST_BANK_PULSES = 64
type Say = (path: string, code: string, found: string, remedy: string) => void
const m = (value: number) => quantity(value, 'm')

/** Farthest range of the study where none is stated, m: instrumented range, else half the way light goes between two pulses of the fastest rate. */
export const instrumentedRangeOf = (radar: RadarDoc, run: RunDoc | undefined): number =>
  radar.instrumentedRangeM ?? run?.maxRangeM ?? SPEED_OF_LIGHT_MS / (2 * Math.max(...radar.prfHz))

function checkTerrain(terrain: readonly TerrainFileDoc[], say: Say): void {
  terrain.forEach((t, i) => {
    if (t.heights === 'ellipsoidal')
      say(
        `terrain[${i}].heights`,
        'ellipsoidal',
        'heights above the ellipsoid cannot be used without a geoid model',
        'convert the file to heights above mean sea level and state "orthometric"',
      )
  })
}

function checkLandCover(doc: StudyDoc, say: Say): void {
  const cover = doc.landCover
  if (!cover) return
  if (cover.legend === 'custom' && Object.keys(cover.classes ?? {}).length === 0)
    say('landCover.classes', 'missing', 'a custom legend has no classes', 'give each class number a terrain and a coverHeightM')
  for (const key of Object.keys(cover.classes ?? {}))
    if (!/^\d{1,5}$/.test(key))
      say(`landCover.classes.${key}`, 'class-number', `class "${key}" is not a number`, 'use the class numbers of the raster as keys')
}

function checkPulse(r: RadarDoc, say: Say): void {
  const compressed = r.compressedPulseWidthS ?? r.pulseWidthS
  if (compressed > r.pulseWidthS * (1 + 1e-9))
    say(
      'radar.compressedPulseWidthS',
      'pulse',
      `compressed pulse ${quantity(compressed, 's')} is longer than the pulse ${quantity(r.pulseWidthS, 's')}`,
      'give a compressed pulse width up to radar.pulseWidthS',
    )
  const product = (r.noiseBandwidthHz ?? 1 / compressed) * compressed
  if (product < 0.5 || product > 2)
    say(
      'radar.noiseBandwidthHz',
      'bandwidth',
      `noise bandwidth times compressed pulse width is ${quantity(product, '')}, outside 0.5 to 2`,
      `give the bandwidth of the filter for the compressed pulse, about ${quantity(1 / compressed, 'Hz')}`,
    )
  if (r.prfHz.length === 0) say('radar.prfHz', 'missing', 'no pulse repetition frequency', 'give at least one in Hz')
  else if (r.pulseWidthS * Math.max(...r.prfHz) >= 1)
    say(
      'radar.pulseWidthS',
      'pulse',
      `pulse ${quantity(r.pulseWidthS, 's')} is as long as the pulse interval`,
      `give a pulse shorter than ${quantity(1 / Math.max(...r.prfHz), 's')}`,
    )
  const rates = r.prfHz.length
  if (r.prfMode !== undefined && r.prfMode !== 'single' && rates < 2)
    say('radar.prfMode', 'prf', `${r.prfMode} with ${rates} pulse repetition frequency`, 'list two or more in radar.prfHz, or use "single"')
  if (r.dwellsNeeded !== undefined && r.prfMode !== 'dwellStagger')
    say('radar.dwellsNeeded', 'prf', 'PRFs change within the dwell or not at all', 'set radar.prfMode to "dwellStagger", or leave it out')
  else if (r.dwellsNeeded !== undefined && (r.dwellsNeeded > rates || !Number.isInteger(r.dwellsNeeded)))
    say('radar.dwellsNeeded', 'prf', `${r.dwellsNeeded} of ${rates} PRFs`, `give a whole number from 1 to ${rates}`)
  if ((r.prfMode ?? 'single') === 'single' && rates > 1)
    say(
      'radar.prfHz',
      'prf',
      `${rates} pulse repetition frequencies in mode "single"`,
      'list one, or set radar.prfMode to "pulseStagger" or "dwellStagger"',
    )
}

function checkAntenna(r: RadarDoc, say: Say): void {
  const a = r.antenna
  const table = a.elevationTable
  if (a.elevationPattern === 'table' && (table?.length ?? 0) < 2)
    say(
      'radar.antenna.elevationTable',
      'pattern',
      'elevation pattern "table" has fewer than two rows',
      'give rows of [angle from the beam peak in deg, dB]',
    )
  if (table && table.length > 0) {
    const peak = Math.max(...table.map(([, db]) => db))
    if (peak !== 0)
      say(
        'radar.antenna.elevationTable',
        'pattern',
        `largest value of the elevation table is ${quantity(peak, 'dB')}`,
        'give dB relative to the beam peak, largest value 0',
      )
    const i = table.findIndex(([angle], k) => k > 0 && angle <= table[k - 1]![0])
    if (i > 0)
      say(
        `radar.antenna.elevationTable[${i}]`,
        'pattern',
        `angle ${table[i]![0]} deg does not come after ${table[i - 1]![0]} deg`,
        'list the angles in rising order, each once',
      )
  }
  const elevationBeamwidth = a.elevationBeamwidthDeg
  if (
    a.elevationPattern === 'cosecant-squared' &&
    a.cosecantLimitDeg !== undefined &&
    elevationBeamwidth !== undefined &&
    a.cosecantLimitDeg < elevationBeamwidth
  )
    say(
      'radar.antenna.cosecantLimitDeg',
      'pattern',
      `cosecant-squared limit ${a.cosecantLimitDeg} deg is inside the beamwidth ${elevationBeamwidth} deg`,
      'give a limit above the elevation beamwidth',
    )
}

function checkReceiver(r: RadarDoc, say: Say): void {
  const s = r.suppression
  if (s?.kind === 'stated' && s.statedDb === undefined)
    say('radar.suppression.statedDb', 'missing', 'stated suppression without a value', 'give the improvement factor in dB')
  if (s?.kind === 'canceller' && s.pulses !== undefined && s.pulses > 4)
    say('radar.suppression.pulses', 'range', `canceller of ${s.pulses} pulses`, 'give 1 to 4 pulses, or use "filterBank"')
  if (s?.kind === 'filterBank' && s.pulses !== undefined && s.pulses > MOST_BANK_PULSES)
    say('radar.suppression.pulses', 'range', `bank of ${s.pulses} filters`, `give up to ${MOST_BANK_PULSES}`)
  const stc = r.stc
  if (stc?.kind === 'curve') {
    if ((stc.curve?.length ?? 0) === 0)
      say('radar.stc.curve', 'missing', 'sensitivity curve without points', 'give rows of [slant range in m, dB]')
    const c = stc.curve ?? []
    const i = c.findIndex(([range], k) => k > 0 && range <= c[k - 1]![0])
    if (i > 0)
      say(
        `radar.stc.curve[${i}]`,
        'order',
        `range ${m(c[i]![0])} does not come after ${m(c[i - 1]![0])}`,
        'list the ranges in rising order, each once',
      )
  }
  if (stc?.kind === 'rtoFourth')
    for (const key of ['cornerM', 'maxDb'] as const)
      if (stc[key] === undefined) say(`radar.stc.${key}`, 'missing', 'is missing', 'give cornerM in m and maxDb in dB for "rtoFourth"')
}

function checkNeeds(needs: readonly NeedDoc[], pfa: number | null, say: Say): void {
  needs.forEach((n, i) => {
    if ((n.kind === 'layer' || n.kind === 'polygon') && n.heightM === undefined)
      say(`needs[${i}].heightM`, 'missing', `a need of kind "${n.kind}" has no height`, 'give one height or [floor, ceiling] in m')
    if (pfa !== null && (n.pd ?? 0.8) <= pfa)
      say(`needs[${i}].pd`, 'pd', `detection probability ${n.pd} is not above the false-alarm probability ${pfa}`, 'give a larger one')
    if (n.kind !== 'layer' && n.file === undefined)
      say(`needs[${i}].file`, 'missing', `a need of kind "${n.kind}" has no file`, 'name the file beside the study')
    if (n.fromRangeM !== undefined && n.toRangeM !== undefined && n.fromRangeM >= n.toRangeM)
      say(
        `needs[${i}].toRangeM`,
        'order',
        `need ends at ${m(n.toRangeM)}, not beyond its start at ${m(n.fromRangeM)}`,
        'give a toRangeM above fromRangeM',
      )
    if (n.sectorDeg && n.sectorDeg[0] === n.sectorDeg[1])
      say(
        `needs[${i}].sectorDeg`,
        'order',
        `sector from ${n.sectorDeg[0]} to ${n.sectorDeg[1]} deg is empty`,
        'give [from, to] clockwise, or [0, 360] for all round',
      )
  })
}

function checkCandidates(candidates: readonly CandidateDoc[], say: Say): void {
  candidates.forEach((c, i) => {
    if (c.mastHeightsM.length === 0)
      say(
        `candidates[${i}].mastHeightsM`,
        'missing',
        'no mast height',
        'give at least one height of the electrical centre above ground in m',
      )
    for (const key of ['mastHeightsM', 'tiltsDeg'] as const) {
      const list = c[key] ?? []
      const k = list.findIndex((v, n) => list.indexOf(v) < n)
      if (k >= 0)
        say(
          `candidates[${i}].${key}[${k}]`,
          'twice',
          `${quantity(list[k]!, key === 'tiltsDeg' ? 'deg' : 'm')} is listed twice`,
          'list every value once',
        )
    }
    if (c.tiltsDeg && c.tiltsDeg.length === 0)
      say(`candidates[${i}].tiltsDeg`, 'missing', 'list of tilts is empty', "give a tilt, or null for the antenna's own")
  })
}

function checkRanking(ranking: RankingDoc, say: Say): void {
  ranking.criteria.forEach((c, i) => {
    if (c.worst === c.best)
      say(`ranking.criteria[${i}].best`, 'range', `worst and best are both ${c.best}`, 'give two different values, the better one as best')
    const earlier = ranking.criteria.findIndex((o) => o.figure === c.figure)
    if (earlier < i)
      say(`ranking.criteria[${i}].figure`, 'twice', `figure "${c.figure}" is already criterion ${earlier + 1}`, 'list every figure once')
  })
}

function checkIds(list: readonly { id: string }[], name: string, say: Say): void {
  const first = new Map<string, number>()
  list.forEach(({ id }, i) => {
    const earlier = first.get(id)
    if (earlier === undefined) first.set(id, i)
    else
      say(
        `${name}[${i}].id`,
        'duplicate-id',
        `identifier "${id}" is already taken by ${name}[${earlier}]`,
        'give every entry its own identifier',
      )
  })
}

function checkRun(radar: RadarDoc, run: RunDoc, say: Say): void {
  const beamwidth = radar.antenna.azimuthBeamwidthDeg
  const longestStep = beamwidth / 4
  const stated = run.azimuthStepDeg
  if (stated !== undefined && stated > longestStep * (1 + 1e-9))
    say(
      'run.azimuthStepDeg',
      'azimuth-step',
      `azimuth step ${quantity(stated, 'deg')} is over a quarter of the ${quantity(beamwidth, 'deg')} beam`,
      `use ${quantity(evenStepDeg(Math.min(longestStep, 90)), 'deg')} or less`,
    )
  const azimuthStep = stated === undefined ? defaultAzimuthStepDeg(beamwidth) : evenStepDeg(stated)
  const gate = gateOfM(shortestPulseS(radar))
  const range = run.maxRangeM ?? instrumentedRangeOf(radar, run)
  const longest = longestRangeStepM(gate, range, azimuthStep)
  const step = run.rangeStepM
  if (step !== undefined && step > longest * (1 + 1e-9)) {
    say(
      'run.rangeStepM',
      'range-step',
      `range step ${m(step)} is over the range gate of ${m(gate)}`,
      `use ${m(Math.floor(longest * 10) / 10)} or less`,
    )
    return
  }
  const cells = cellsOf(range, step ?? longest, azimuthStep)
  if (cells > MAX_POLAR_CELLS) {
    const room = Math.floor((MAX_POLAR_CELLS / Math.round(360 / azimuthStep)) * (step ?? longest))
    const found = `${(cells / 1e6).toFixed(1)} million cells of ${quantity(azimuthStep, 'deg')} by ${m(step ?? longest)}, over the 16 million allowed`
    say(
      run.maxRangeM === undefined && step !== undefined ? 'run.rangeStepM' : 'run.maxRangeM',
      'too-many-cells',
      found,
      `use a maxRangeM up to ${room} m or longer steps`,
    )
  }
}

/**
 * What one field alone cannot tell: bandwidth times pulse, pattern peak, grid steps, number of cells, identifiers given twice.
 * `ok(part)` says whether that part of the document has the right shape; other parts are left alone.
 */
export function crossChecks(doc: StudyDoc, ok: (part: string) => boolean): Problem[] {
  const problems: Problem[] = []
  const say: Say = (path, code, found, remedy) => problems.push({ path, code, found, remedy })
  if (ok('terrain')) checkTerrain(doc.terrain, say)
  if (ok('landCover')) checkLandCover(doc, say)
  if (ok('radar')) {
    checkPulse(doc.radar, say)
    checkPulses(doc.radar, say)
    checkAntenna(doc.radar, say)
    checkReceiver(doc.radar, say)
    if (ok('run') && doc.radar.prfHz.length > 0) checkRun(doc.radar, doc.run ?? {}, say)
  }
  if (ok('needs')) {
    checkNeeds(doc.needs ?? [], ok('radar') ? (doc.radar.pfa ?? 1e-6) : null, say)
    checkIds(doc.needs ?? [], 'needs', say)
  }
  if (ok('ranking') && doc.ranking) checkRanking(doc.ranking, say)
  if (ok('confirmations')) checkConfirmations(doc.confirmations ?? [], say)
  if (ok('candidates')) {
    checkCandidates(doc.candidates, say)
    checkIds(doc.candidates, 'candidates', say)
  }
  return problems
}
