import { DEG_PER_RAD, RAD_PER_DEG } from '../units/index.ts'
import { normalLon } from './longitude.ts'

export interface TransverseMercator {
  readonly a: number
  readonly f: number
  readonly lon0Deg: number
  readonly lat0Deg: number
  readonly k0: number
  readonly falseEasting: number
  readonly falseNorthing: number
  readonly metresPerUnit: number
}
export interface ProjectionPair {
  toLonLat(x: number, y: number): [number, number]
  fromLonLat(lon: number, lat: number): [number, number]
}

/**
 * Transverse Mercator by Krüger's series to the sixth order in n: within 0.1 mm to 3000 km of the central meridian.
 * x, y in the CRS's own unit, degrees out. Source: Karney, Transverse Mercator with an accuracy of a few nanometers, J. Geodesy 85 (2011), eq. 7-36.
 */
export function transverseMercator(p: TransverseMercator): ProjectionPair {
  const n = p.f / (2 - p.f)
  const n2 = n * n
  const n3 = n2 * n
  const n4 = n3 * n
  const n5 = n4 * n
  const n6 = n5 * n
  const e = Math.sqrt(p.f * (2 - p.f))
  const radius = (p.a / (1 + n)) * (1 + n2 / 4 + n4 / 64 + n6 / 256) * p.k0
  const alpha = [
    n / 2 - (2 * n2) / 3 + (5 * n3) / 16 + (41 * n4) / 180 - (127 * n5) / 288 + (7891 * n6) / 37800,
    (13 * n2) / 48 - (3 * n3) / 5 + (557 * n4) / 1440 + (281 * n5) / 630 - (1983433 * n6) / 1935360,
    (61 * n3) / 240 - (103 * n4) / 140 + (15061 * n5) / 26880 + (167603 * n6) / 181440,
    (49561 * n4) / 161280 - (179 * n5) / 168 + (6601661 * n6) / 7257600,
    (34729 * n5) / 80640 - (3418889 * n6) / 1995840,
    (212378941 * n6) / 319334400,
  ] as const
  const beta = [
    n / 2 - (2 * n2) / 3 + (37 * n3) / 96 - n4 / 360 - (81 * n5) / 512 + (96199 * n6) / 604800,
    n2 / 48 + n3 / 15 - (437 * n4) / 1440 + (46 * n5) / 105 - (1118711 * n6) / 3870720,
    (17 * n3) / 480 - (37 * n4) / 840 - (209 * n5) / 4480 + (5569 * n6) / 90720,
    (4397 * n4) / 161280 - (11 * n5) / 504 - (830251 * n6) / 7257600,
    (4583 * n5) / 161280 - (108847 * n6) / 3991680,
    (20648693 * n6) / 638668800,
  ] as const

  /** Σ c_j sin/cos(2jξ)·cosh/sinh(2jη) by Clenshaw's recurrence on complex numbers; result in sumRe, sumIm. */
  let sumRe = 0
  let sumIm = 0
  function series(c: readonly number[], xi: number, eta: number): void {
    const s = Math.sin(2 * xi)
    const co = Math.cos(2 * xi)
    const ex = Math.exp(2 * eta)
    const ch = (ex + 1 / ex) / 2
    const sh = (ex - 1 / ex) / 2
    const ar = 2 * co * ch
    const ai = -2 * s * sh
    let y0r = 0
    let y0i = 0
    let y1r = 0
    let y1i = 0
    for (let j = 5; j >= 0; j--) {
      const tr = ar * y0r - ai * y0i - y1r + c[j]
      const ti = ar * y0i + ai * y0r - y1i
      y1r = y0r
      y1i = y0i
      y0r = tr
      y0i = ti
    }
    const zr = s * ch
    const zi = co * sh
    sumRe = zr * y0r - zi * y0i
    sumIm = zr * y0i + zi * y0r
  }

  function forward(lon: number, lat: number): [number, number] {
    let d = lon - p.lon0Deg
    if (d >= 180) d -= 360
    else if (d < -180) d += 360
    const lam = d * RAD_PER_DEG
    const sinPhi = Math.sin(lat * RAD_PER_DEG)
    // conformal latitude: t = sinh(asinh(tan φ) − e atanh(e sin φ)) written with sin χ
    const q = Math.atanh(sinPhi) - e * Math.atanh(e * sinPhi)
    const t = Math.sinh(q)
    const cosLam = Math.cos(lam)
    const xi1 = Math.atan2(t, cosLam)
    const eta1 = Math.asinh(Math.sin(lam) / Math.sqrt(t * t + cosLam * cosLam))
    series(alpha, xi1, eta1)
    return [radius * (eta1 + sumIm), radius * (xi1 + sumRe)]
  }
  const northing0 = forward(p.lon0Deg, p.lat0Deg)[1]
  const unit = p.metresPerUnit
  return {
    fromLonLat(lon, lat) {
      const xy = forward(lon, lat)
      xy[0] = (xy[0] + p.falseEasting) / unit
      xy[1] = (xy[1] - northing0 + p.falseNorthing) / unit
      return xy
    },
    toLonLat(x, y) {
      const eta = (x * unit - p.falseEasting) / radius
      const xi = (y * unit - p.falseNorthing + northing0) / radius
      series(beta, xi, eta)
      const xi1 = xi - sumRe
      const sh = Math.sinh(eta - sumIm)
      const c = Math.cos(xi1)
      const tauConformal = Math.sin(xi1) / Math.hypot(sh, c)
      const lam = Math.atan2(sh, c)
      return [normalLon(p.lon0Deg + lam * DEG_PER_RAD), latitudeOfConformal(tauConformal, e) * DEG_PER_RAD]
    },
  }
}

/** Geodetic latitude (rad) from the tangent of the conformal latitude: Newton's method, two or three rounds. Source as above, eq. 19-21. */
export function latitudeOfConformal(tauConformal: number, e: number): number {
  const e2m = 1 - e * e
  let tau = tauConformal / e2m
  for (let i = 0; i < 5; i++) {
    const t1 = Math.hypot(1, tau)
    const sigma = Math.sinh(e * Math.atanh((e * tau) / t1))
    const taup = tau * Math.hypot(1, sigma) - sigma * t1
    const step = ((tauConformal - taup) / Math.hypot(1, taup)) * ((1 + e2m * tau * tau) / (e2m * t1))
    tau += step
    if (Math.abs(step) < 1e-12 * Math.max(1, Math.abs(tau))) break
  }
  return Math.atan(tau)
}
