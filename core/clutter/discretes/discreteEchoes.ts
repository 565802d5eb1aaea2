import { elevationGainForClutter } from '../../antenna/index.ts'
import { type PathLoss, twoWayLossDb } from '../../atmosphere/index.ts'
import { type Earth, effectiveRadiusM, elevationAngleDeg, slantRangeM } from '../../geodesy/index.ts'
import { sightPoint } from '../../masking/index.ts'
import { type Ground, type Site, siteGround } from '../../terrain/index.ts'
import { fromDb, wrap180 } from '../../units/index.ts'
import { type Segment, segmentOf } from '../cells/segment.ts'

/** An obstacle with a radar cross-section, in sight from one mast height; its echo comes from its top. */
export interface DiscreteEcho {
  readonly name: string
  readonly azimuthDeg: number
  /** Ground and slant range, m. */
  readonly rangeM: number
  readonly slantM: number
  readonly elevationDeg: number
  readonly topM: number
  readonly rcsM2: number
}

/**
 * Obstacles with a stated `rcsM2` whose top is in sight within a ground range, each on its own ray: what `ClutterOptions.discretes` takes. Of
 * a line, the first position in sight stands for all of it. Holds for every tilt of the height.
 */
export function discreteEchoes(g: Ground, site: Site, heightM: number, earth: Earth, maxRangeM: number): DiscreteEcho[] {
  const antennaM = siteGround(g, site) + heightM
  return g.obstacles.flatMap(({ name, path, rcsM2 }) => {
    if (!rcsM2) return []
    for (const at of path) {
      const { inSight, azimuthDeg, rangeM, surfaceM: topM } = sightPoint(g, site, heightM, earth, at)
      if (!inSight || rangeM < 1 || rangeM > maxRangeM) continue
      const radius = effectiveRadiusM(earth, site.lat, azimuthDeg)
      const slantM = slantRangeM(antennaM, topM, rangeM, radius)
      return [{ name, azimuthDeg, rangeM, slantM, elevationDeg: elevationAngleDeg(antennaM, topM, rangeM, radius), topM, rcsM2 }]
    }
    return []
  })
}

/** A discrete echo through one radar and tilt. */
export interface PlacedEcho {
  readonly name: string
  readonly azimuthDeg: number
  readonly rangeM: number
  /** Echo over noise with the azimuth beam on it, in a gate that holds it, ratio; a cell longer than the gate holds the mean of its gates. */
  readonly ratio: number
  /** It lies in the gates whose middle is within this, m. */
  readonly reachM: number
}

/** C/N of discrete echoes on the azimuth beam: radar equation, two-way elevation gain with the side-lobe floor, losses of the weather. */
export function placeEchoes(
  echoes: readonly DiscreteEcho[],
  antennaM: number,
  segments: readonly Segment[],
  tiltDeg: number,
  loss: PathLoss | null,
  rangeStepM: number,
): PlacedEcho[] {
  return echoes.flatMap(({ name, azimuthDeg, rangeM, slantM, elevationDeg, topM, rcsM2 }) => {
    const segment = segmentOf(segments, slantM)
    if (!segment) return []
    const { radar, constant, gateM } = segment
    const transmit = elevationGainForClutter(radar.antenna, elevationDeg, tiltDeg)
    const receive = radar.receiveAntenna ? elevationGainForClutter(radar.receiveAntenna, elevationDeg, tiltDeg) : transmit
    const passed = fromDb(-twoWayLossDb(loss, antennaM, topM, rangeM, slantM))
    const ratio = (constant * rcsM2 * transmit * receive * passed) / slantM ** 4
    return { name, azimuthDeg, rangeM, ratio: ratio * Math.min(1, gateM / rangeStepM), reachM: Math.max(gateM, rangeStepM) / 2 }
  })
}

/** Two-way azimuth beam toward an echo from a pointing, ratio; 0 past the reach of the beam, degrees. */
export function towardEcho(azimuthDeg: number, echo: PlacedEcho, beamwidthDeg: number, reachDeg: number): number {
  const off = Math.abs(wrap180(azimuthDeg - echo.azimuthDeg))
  return off > reachDeg ? 0 : Math.exp(-8 * Math.LN2 * (off / beamwidthDeg) ** 2)
}
