/** What a number of the study may be. Data for the checks at the door and for the hints beside form fields. */
export interface Limit {
  /** What it is, for sentences: 'frequency'. */
  readonly what: string
  /** SI unit or 'deg', 'dB', 'rpm' …; '' for a plain number. */
  readonly unit: string
  readonly low: number
  readonly high: number
  /** True where `low` itself is not allowed. */
  readonly lowOpen?: boolean
  readonly highOpen?: boolean
  readonly whole?: boolean
}

const limit = (what: string, unit: string, low: number, high: number, more: Partial<Limit> = {}): Limit => ({
  what,
  unit,
  low,
  high,
  ...more,
})
const OPEN = { lowOpen: true } as const

/** Limits by key path; `[]` stands for any index. */
export const LIMITS: Readonly<Record<string, Limit>> = {
  'terrain[].verticalErrorM': limit('height error', 'm', 0, 1000),
  'landCover.classes.*.coverHeightM': limit('cover height', 'm', 0, 150),
  'declination.valueDeg': limit('declination', 'deg', -180, 180),
  'atmosphere.effectiveEarthFactor': limit('effective-earth factor', '', -1000, 1000),
  'atmosphere.earthRadiusM': limit('earth radius', 'm', 3e6, 1e7),
  'atmosphere.rainRateMmH': limit('rain rate', 'mm/h', 0, 300),
  'atmosphere.windMs': limit('wind speed', 'm/s', 0, 60),
  'atmosphere.seaSpreadMs': limit('spread of sea echoes', 'm/s', 0, 20),
  'atmosphere.seaMeanMs': limit('mean velocity of sea echoes', 'm/s', -50, 50),
  'atmosphere.rainSpreadMs': limit('spread of rain echoes', 'm/s', 0, 20),
  'atmosphere.rainMeanMs': limit('mean velocity of rain echoes', 'm/s', -100, 100),
  'atmosphere.seaState': limit('sea state', '', 0, 9),
  'atmosphere.rainTopM': limit('height of the rain top', 'm', 0, 20_000),
  'atmosphere.rainExtentM': limit('extent of the rain', 'm', 0, 2e6),
  'atmosphere.tideM': limit('tide', 'm', -20, 20),
  'ranking.criteria[].worst': limit('worst value', '', -1e9, 1e9),
  'ranking.criteria[].best': limit('best value', '', -1e9, 1e9),
  'ranking.criteria[].weight': limit('weight', '', 0, 1000, OPEN),
  'radar.frequencyHz': limit('frequency', 'Hz', 30e6, 40e9),
  'radar.peakPowerW': limit('peak power', 'W', 0, 1e9, OPEN),
  'radar.pulseWidthS': limit('pulse width', 's', 1e-9, 0.1),
  'radar.compressedPulseWidthS': limit('compressed pulse width', 's', 1e-9, 0.1),
  'radar.noiseBandwidthHz': limit('noise bandwidth', 'Hz', 1, 1e10),
  'radar.prfHz[]': limit('pulse repetition frequency', 'Hz', 1, 1e6),
  'radar.dwellsNeeded': limit('number of PRFs a target must be usable on', '', 1, 64),
  'radar.pulses[].widthS': limit('pulse width', 's', 1e-9, 0.1),
  'radar.pulses[].compressedWidthS': limit('compressed pulse width', 's', 1e-9, 0.1),
  'radar.pulses[].noiseBandwidthHz': limit('noise bandwidth', 'Hz', 1, 1e10),
  'radar.pulses[].fromRangeM': limit('start of the range of a pulse', 'm', 0, 2e6),
  'radar.pulses[].toRangeM': limit('end of the range of a pulse', 'm', 0, 4e6, OPEN),
  'radar.pulses[].rangeSidelobeDb': limit('range side-lobe level', 'dB', -120, 0),
  'radar.beams[].offsetDeg': limit('beam peak over the tilt', 'deg', -45, 90),
  'radar.beamSwitch[].fromRangeM': limit('start of the range of a beam', 'm', 0, 2e6),
  'radar.beamSwitch[].toRangeM': limit('end of the range of a beam', 'm', 0, 4e6, OPEN),
  'radar.circular.rainLossDb': limit('rejection of rain', 'dB', 0, 40),
  'radar.circular.targetLossDb': limit('loss of a target', 'dB', 0, 20),
  'radar.rotationRpm': limit('rotation rate', 'rpm', 0, 600, OPEN),
  'radar.noiseFigureDb': limit('noise figure', 'dB', 0, 40),
  'radar.systemLossDb': limit('system loss', 'dB', 0, 60),
  'radar.pfa': limit('false-alarm probability', '', 1e-14, 0.1),
  'radar.antenna.gainDbi': limit('antenna gain', 'dBi', -20, 80),
  'radar.antenna.azimuthBeamwidthDeg': limit('azimuth beamwidth', 'deg', 0, 360, OPEN),
  'radar.antenna.elevationBeamwidthDeg': limit('elevation beamwidth', 'deg', 0, 180, OPEN),
  'radar.antenna.cosecantLimitDeg': limit('upper limit of the cosecant-squared pattern', 'deg', 0, 90, OPEN),
  'radar.antenna.elevationTable[][0]': limit('angle of the elevation table', 'deg', -180, 180),
  'radar.antenna.elevationTable[][1]': limit('level of the elevation table', 'dB', -300, 0),
  'radar.antenna.sidelobeDb': limit('azimuth side-lobe level', 'dB', -300, 0),
  'radar.antenna.elevationSidelobeDb': limit('elevation side-lobe level', 'dB', -300, 0),
  'radar.antenna.tiltDeg': limit('tilt', 'deg', -90, 90),
  'radar.antenna.apertureWidthM': limit('aperture width', 'm', 0, 500, OPEN),
  'radar.antenna.apertureHeightM': limit('aperture height', 'm', 0, 500, OPEN),
  'radar.suppression.statedDb': limit('stated suppression', 'dB', 0, 200),
  'radar.suppression.pulses': limit('number of pulses', '', 1, 1024, { whole: true }),
  'radar.suppression.stabilityLimitDb': limit('stability limit', 'dB', 0, 200),
  'radar.suppression.bits': limit('number of converter bits', '', 1, 32, { whole: true }),
  'radar.stc.curve[][0]': limit('slant range of the sensitivity curve', 'm', 0, 2e6),
  'radar.stc.curve[][1]': limit('attenuation', 'dB', 0, 200),
  'radar.stc.cornerM': limit('corner range', 'm', 0, 2e6, OPEN),
  'radar.stc.maxDb': limit('largest attenuation', 'dB', 0, 200),
  'radar.straddleLossDb': limit('straddling loss', 'dB', 0, 20),
  'radar.cfarLossDb': limit('loss of the adaptive threshold', 'dB', 0, 20),
  'radar.cfarReferenceCells': limit('number of reference cells', '', 2, 1024, { whole: true }),
  'radar.recoveryS': limit('recovery time', 's', 0, 0.1),
  'radar.receiverLinearRangeDb': limit('linear range of the receiver', 'dB', 0, 200),
  'radar.instrumentedRangeM': limit('instrumented range', 'm', 100, 2e6),
  vehicleRcsM2: limit('radar cross-section of a vehicle', 'm²', 0, 1e6, OPEN),
  'needs[].rcsM2': limit('radar cross-section', 'm²', 0, 1e9, OPEN),
  'needs[].pd': limit('detection probability', '', 0, 1, { lowOpen: true, highOpen: true }),
  'needs[].requiredRatioDb': limit('required signal-to-noise ratio', 'dB', -30, 80),
  'needs[].requiredPct': limit('required share of the area', '%', 0, 100, OPEN),
  'needs[].heightM': limit('height of the need', 'm', -1000, 100_000),
  'needs[].fromRangeM': limit('start of the need', 'm', 0, 2e6),
  'needs[].toRangeM': limit('end of the need', 'm', 0, 2e6, OPEN),
  'needs[].sectorDeg[]': limit('sector edge', 'deg', -360, 360),
  'needs[].speedMs': limit('speed over ground', 'm/s', 0, 2000, OPEN),
  'needs[].qnhHpa': limit('pressure setting', 'hPa', 850, 1100),
  'candidates[].lon': limit('longitude', 'deg', -180, 180),
  'candidates[].lat': limit('latitude', 'deg', -90, 90),
  'candidates[].groundHeightM': limit('ground height', 'm', -1000, 9000),
  'candidates[].mastHeightsM[]': limit('mast height', 'm', 0, 1000, OPEN),
  'candidates[].tiltsDeg[]': limit('tilt', 'deg', -90, 90),
  'candidates[].clearingRadiusM': limit('clearing radius', 'm', 0, 20_000),
  'confirmations[].altitudeM': limit('altitude', 'm', -1000, 100_000),
  'confirmations[].heightM': limit('mast height', 'm', 0, 1000, OPEN),
  'run.maxRangeM': limit('range of the grid', 'm', 100, 2e6),
  'run.rangeStepM': limit('range step', 'm', 0.1, 20_000),
  'run.foldRangeM': limit('range of folded clutter', 'm', 100, 2e6),
  'run.azimuthStepDeg': limit('azimuth step', 'deg', 0.001, 90),
}

/** The limit of a key path such as `candidates[2].mastHeightsM[0]`, or undefined where there is none. */
export function limitOf(path: string): Limit | undefined {
  const anyIndex = path.replace(/\[\d+\]/g, '[]').replace(/^landCover\.classes\.[^.]+/, 'landCover.classes.*')
  return LIMITS[anyIndex] ?? LIMITS[anyIndex.replace(/\[\]$/, '')] ?? LIMITS[path.replace(/\[\d+\](?!$)/g, '[]')]
}

/** `50 GHz`, `1.2 µs`, `-5 m`: a value as it stands in a sentence. */
export function quantity(value: number, unit: string): string {
  const plain = (v: number) => String(Number(v.toPrecision(7)))
  if (!Number.isFinite(value)) return String(value)
  const size = Math.abs(value)
  if (unit === 'Hz' && size >= 1e9) return `${plain(value / 1e9)} GHz`
  if (unit === 'Hz' && size >= 1e6) return `${plain(value / 1e6)} MHz`
  if (unit === 'Hz' && size >= 1e4) return `${plain(value / 1e3)} kHz`
  if (unit === 's' && size < 1e-6) return `${plain(value * 1e9)} ns`
  if (unit === 's' && size < 1e-3) return `${plain(value * 1e6)} µs`
  if (unit === 's' && size < 1) return `${plain(value * 1e3)} ms`
  return unit === '' ? plain(value) : `${plain(value)} ${unit}`
}

/** What may stand there, as an imperative clause: `give a frequency from 30 MHz to 40 GHz`. */
export function allowed(l: Limit): string {
  const low = quantity(l.low, l.unit)
  const high = quantity(l.high, l.unit)
  const a = /^[aeiou]/.test(l.what) ? 'an' : 'a'
  const kind = l.whole ? ', a whole number' : ''
  if (l.lowOpen) return `give ${a} ${l.what} above ${low} and ${l.highOpen ? 'below' : 'up to'} ${high}${kind}`
  return `give ${a} ${l.what} from ${low} to ${high}${kind}`
}

/** True where the value may stand. */
export function within(l: Limit, value: number): boolean {
  if (!Number.isFinite(value)) return false
  if (l.lowOpen ? value <= l.low : value < l.low) return false
  if (l.highOpen ? value >= l.high : value > l.high) return false
  return !l.whole || Number.isInteger(value)
}
