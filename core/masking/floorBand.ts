/**
 * 90 % error band of the coverage floor at a range behind a controlling obstacle at another, m: √[(E_O·r/d)² + (E_A·(1 − r/d))²], E_O the error of the
 * obstacle's top and E_A of the antenna's height (linear errors of 90 %). At the obstacle itself (r = d) it is E_O.
 */
export function floorBand(rangeM: number, controlM: number, obstacleErrorM: number, antennaErrorM: number): number {
  const t = rangeM / controlM
  const a = obstacleErrorM * t
  const b = antennaErrorM * (1 - t)
  return Math.sqrt(a * a + b * b)
}
