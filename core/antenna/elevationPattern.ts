import { InputError } from '../errors/index.ts'
import { fromDb, RAD_PER_DEG } from '../units/index.ts'
import type { AntennaInput } from './types.ts'

/** 4 ln 2: a Gaussian beam is exp(−4 ln2 (offset/beamwidth)²), half power at half a beamwidth. */
const FOUR_LN2 = 4 * Math.LN2

/** One-way Gaussian beam, ratio to the peak; offset and half-power beamwidth in the same unit. Mathematics; exact at any offset. */
export function gaussianBeam(offset: number, beamwidth: number): number {
  const x = offset / beamwidth
  return Math.exp(-FOUR_LN2 * x * x)
}

/**
 * One-way elevation gain toward a target, ratio to the peak (0…1), at an elevation at the antenna in degrees. Outside a cosecant-squared
 * limit or a table's rows it is 0: side lobes are never counted for a target. Source: Gaussian beam and cosecant-squared law (Skolnik,
 * Introduction to Radar Systems); joined at the upper half-power point.
 */
export function elevationGain(a: AntennaInput, elevationDeg: number, tiltDeg: number = a.tiltDeg): number {
  const offset = elevationDeg - tiltDeg - (a.offsetDeg ?? 0)
  switch (a.elevationPattern) {
    case 'gaussian':
      return gaussianBeam(offset, a.elevationBeamwidthDeg)
    case 'cosecant-squared': {
      const theta3 = a.elevationBeamwidthDeg
      const beta = offset + theta3 / 2
      if (beta <= theta3) return gaussianBeam(offset, theta3)
      if (beta > a.cosecantLimitDeg) return 0
      const ratio = Math.sin(theta3 * RAD_PER_DEG) / Math.sin(beta * RAD_PER_DEG)
      return 0.5 * ratio * ratio
    }
    case 'table':
      return tableGain(a.elevationTable, offset)
  }
}

/** The same for clutter: never below `elevationSidelobeDb`. */
export function elevationGainForClutter(a: AntennaInput, elevationDeg: number, tiltDeg: number = a.tiltDeg): number {
  return Math.max(elevationGain(a, elevationDeg, tiltDeg), fromDb(a.elevationSidelobeDb))
}

/** dB linear between rows; 0 outside them. */
function tableGain(rows: AntennaInput['elevationTable'], offsetDeg: number): number {
  const last = rows.length - 1
  if (last < 0 || !(offsetDeg >= rows[0][0]) || offsetDeg > rows[last][0]) return 0
  let lo = 0
  let hi = last
  while (hi - lo > 1) {
    const mid = (lo + hi) >> 1
    if (rows[mid][0] <= offsetDeg) lo = mid
    else hi = mid
  }
  const [a0, d0] = rows[lo]
  const [a1, d1] = rows[hi]
  return fromDb(hi === lo ? d0 : d0 + ((d1 - d0) * (offsetDeg - a0)) / (a1 - a0))
}

/** Refuses a pattern that cannot be read one way: rows must rise in angle and the largest value must be 0 dB. Throws InputError. */
export function checkElevationPattern(a: AntennaInput, file?: string): void {
  const refuse = (place: string, found: string, remedy: string): never => {
    throw new InputError({ code: 'elevation-pattern', file, place: `radar.antenna.${place}`, found, remedy })
  }
  if (a.elevationPattern !== 'table') {
    if (!(a.elevationBeamwidthDeg > 0)) refuse('elevationBeamwidthDeg', `is ${a.elevationBeamwidthDeg}`, 'give a beamwidth above 0 degrees')
    return
  }
  const rows = a.elevationTable
  if (rows.length < 2) refuse('elevationTable', `has ${rows.length} row(s)`, 'give at least two rows of [degrees, dB]')
  let peakDb = Number.NEGATIVE_INFINITY
  rows.forEach(([angleDeg, db], i) => {
    if (!Number.isFinite(angleDeg) || !Number.isFinite(db)) refuse(`elevationTable[${i}]`, 'is not two numbers', 'give [degrees, dB]')
    if (i > 0 && angleDeg <= rows[i - 1][0])
      refuse(`elevationTable[${i}]`, `angle ${angleDeg} does not rise`, 'sort the rows by angle, each once')
    peakDb = Math.max(peakDb, db)
  })
  if (peakDb !== 0) refuse('elevationTable', `has its largest value at ${peakDb} dB`, 'give dB relative to the peak, largest 0')
}
