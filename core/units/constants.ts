/** Exact constants (SI brochure, 9th edition) and the conventions every room shares. */
export const SPEED_OF_LIGHT_MS = 299_792_458
export const BOLTZMANN_J_PER_K = 1.380649e-23
/** Reference temperature of noise figures, K. */
export const T0_K = 290
/** k·T0 in dB(W/Hz). */
export const KT0_DBW_PER_HZ = 10 * Math.log10(BOLTZMANN_J_PER_K * T0_K)
export const M_PER_NM = 1852
export const M_PER_FT = 0.3048
export const M_PER_US_SURVEY_FT = 1200 / 3937
export const MS_PER_KT = 1852 / 3600
export const MPH_PER_MS = 2.23694
/** Mean earth radius used by check cases that name no other, m. */
export const MEAN_EARTH_RADIUS_M = 6_371_000
