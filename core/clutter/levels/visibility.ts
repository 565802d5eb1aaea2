import { gammaFunction } from '../land/weibull.ts'

/**
 * Interclutter visibility: share of the ground of a cell over whose clutter a target is still detected, 1 − exp{−[Γ(1+a)·I·(S/D₀ − N)/C̄]^(1/a)};
 * 0 where S/N is at or below D₀. Mean C/N, improvement, S/N and required ratio in dB for the same pulse, `spread` a_w > 0; no clutter (NaN) gives 1.
 * Mathematics on Weibull clutter.
 */
export function interclutterVisibility(spread: number, cnrDb: number, improvementDb: number, snrDb: number, d0Db: number): number {
  const room = 10 ** ((snrDb - d0Db) / 10) - 1
  if (!(room > 0)) return 0
  if (Number.isNaN(cnrDb)) return 1
  return 1 - Math.exp(-((gammaFunction(1 + spread) * 10 ** ((improvementDb - cnrDb) / 10) * room) ** (1 / spread)))
}
