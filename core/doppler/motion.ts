import type { TerrainName } from '../landcover/index.ts'
import { MS_PER_KT, wavelengthM } from '../units/index.ts'
import { type Correlation, gaussianCorrelation, rainSpreadMs, vegetationCorrelation, vegetationSpectrum } from './correlation.ts'

/** How clutter moves, as a study states it; null = worked out from the wind. Speeds m/s. */
export interface ClutterMotion {
  readonly windMs: number
  readonly seaSpreadMs: number | null
  readonly seaMeanMs: number | null
  readonly rainSpreadMs: number | null
  readonly rainMeanMs: number | null
}
/** Kinds of clutter that move in their own way. */
export type ClutterKind = TerrainName | 'rain' | 'discrete'

/** Spread and mean velocity of a Gaussian spectrum, m/s. */
export interface MovingClutter {
  readonly spreadMs: number
  readonly meanMs: number
}
/** Slant range at which the spread of rain by wind shear is taken where the study says nothing, m: the far end of a rain cell. */
const RAIN_SHEAR_RANGE_M = 15_000
/** Sea drifts at this share of the wind in the azimuth of the wind: our own engineering choice, on the safe side. */
const SEA_DRIFT_SHARE = 0.2

/**
 * Sea echoes: spread 0.46 m/s at 8 kt of wind to 1.1 m/s at 20 kt, linear between and held outside (Nathanson, Radar Design Principles, from
 * memory); mean 0.2 of the wind, our own choice for the azimuth of the wind.
 */
export function seaMotion(m: ClutterMotion): MovingClutter {
  const knots = m.windMs / MS_PER_KT
  const share = Math.min(1, Math.max(0, (knots - 8) / 12))
  return { spreadMs: m.seaSpreadMs ?? 0.46 + 0.64 * share, meanMs: m.seaMeanMs ?? SEA_DRIFT_SHARE * m.windMs }
}

/** Rain echoes: turbulence and wind shear over the beam (`rainSpreadMs`); carried along by the wind, in the azimuth of the wind. */
export function rainMotion(m: ClutterMotion, elevationBeamwidthDeg: number): MovingClutter {
  return {
    spreadMs: m.rainSpreadMs ?? rainSpreadMs(RAIN_SHEAR_RANGE_M, elevationBeamwidthDeg).totalMs,
    meanMs: m.rainMeanMs ?? m.windMs,
  }
}

/**
 * Correlation of one kind of clutter by its own motion, without scanning: wind-blown vegetation for forest, rural and farmland, Gaussian with a
 * mean for sea (water) and rain, none for open ground, towns and discrete echoes.
 */
export function motionCorrelation(kind: ClutterKind, m: ClutterMotion, frequencyHz: number, elevationBeamwidthDeg: number): Correlation {
  const lambda = wavelengthM(frequencyHz)
  switch (kind) {
    case 'forest':
    case 'rural':
    case 'farmland':
      return vegetationCorrelation(vegetationSpectrum(m.windMs, frequencyHz), lambda)
    case 'water': {
      const { spreadMs, meanMs } = seaMotion(m)
      return gaussianCorrelation(spreadMs, lambda, meanMs)
    }
    case 'rain': {
      const { spreadMs, meanMs } = rainMotion(m, elevationBeamwidthDeg)
      return gaussianCorrelation(spreadMs, lambda, meanMs)
    }
    default:
      return () => 1
  }
}
