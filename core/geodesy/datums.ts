/**
 * Helmert shifts to WGS 84 in the order of the +towgs84 parameter (dx, dy, dz m; rx, ry, rz arc seconds, position vector; scale ppm) for older national
 * datums, by EPSG code of the geographic system. Values: EPSG registry, as PROJ lists them; accuracy 1 to 5 m. A datum that is missing here and does not
 * share the WGS 84 / GRS 80 ellipsoid is refused: unshifted it would put the terrain up to 200 m and more beside its place.
 */
const SHIFTS: Readonly<Record<number, string>> = {
  4277: '446.448,-125.157,542.06,0.15,0.247,0.842,-20.489', // OSGB36
  4150: '674.374,15.056,405.346,0,0,0,0', // CH1903+
  4149: '674.374,15.056,405.346,0,0,0,0', // CH1903
  4289: '565.4171,50.3319,465.5524,-0.398957,0.343988,-1.87740,4.0725', // Amersfoort
  4313: '-106.8686,52.2978,-103.7239,0.3366,-0.457,1.8422,-1.2747', // Belge 1972
  4314: '598.1,73.7,418.2,0.202,0.045,-2.455,6.7', // DHDN
  4312: '577.326,90.129,463.919,5.137,1.474,5.297,2.4232', // MGI
}
/** Geographic system under a projected EPSG code, where that system is in SHIFTS. */
const BASE_OF: Readonly<Record<number, number>> = {
  27700: 4277,
  2056: 4150,
  21781: 4149,
  28992: 4289,
  31370: 4313,
  31466: 4314,
  31467: 4314,
  31468: 4314,
  31469: 4314,
  31254: 4312,
  31255: 4312,
  31256: 4312,
  31257: 4312,
  31258: 4312,
  31259: 4312,
  31287: 4312,
}

/** +towgs84 value for an EPSG code (geographic, or projected with a known base), or null. */
export const shiftToWgs84 = (epsg: number | null): string | null => (epsg === null ? null : (SHIFTS[BASE_OF[epsg] ?? epsg] ?? null))

/** Is this ellipsoid WGS 84 or GRS 80 (they differ by 0.1 mm in the minor axis)? Datums on them agree with WGS 84 within about 2 m. */
export const isWgs84Like = (a: number, b: number): boolean => Math.abs(a - 6_378_137) < 0.01 && Math.abs(b - 6_356_752.3142) < 0.01
