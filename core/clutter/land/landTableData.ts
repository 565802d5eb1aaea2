import type { LandTable } from './landTable.ts'

/**
 * Low-angle land clutter, mean σ°F⁴ in dB (propagation included) and Weibull spread of power at cell areas of 10³ and 10⁶ m². Written down from
 * memory after Billingsley, Low-Angle Radar Land Clutter (2002), and Billingsley & Larrabee, TR-916 (1991); not proof-read in print.
 * Bands of depression angle at the ground are [fromDeg, toDeg); null = no limit.
 */
export const BUILT_IN_LAND_TABLE: LandTable = {
  source: 'Billingsley, Low-Angle Radar Land Clutter (2002), from memory',
  mark: 'from memory',
  frequenciesMHz: [167, 435, 1230, 3240, 9200],
  rows: {
    'rural low relief': [
      { fromDeg: 0, toDeg: 0.25, meanDb: [-33, -33, -33, -33, -33], spread1e3: 3.8, spread1e6: 2.5 },
      { fromDeg: 0.25, toDeg: 0.75, meanDb: [-32, -32, -32, -32, -32], spread1e3: 3.5, spread1e6: 2.2 },
      { fromDeg: 0.75, toDeg: 1.5, meanDb: [-30, -30, -30, -30, -30], spread1e3: 3, spread1e6: 1.8 },
      { fromDeg: 1.5, toDeg: 4, meanDb: [-27, -27, -27, -27, -27], spread1e3: 2.7, spread1e6: 1.6 },
      { fromDeg: 4, toDeg: null, meanDb: [-25, -25, -25, -25, -25], spread1e3: 2.6, spread1e6: 1.5 },
    ],
    'forest low relief': [
      { fromDeg: 0, toDeg: 0.3, meanDb: [-45, -42, -40, -39, -37], spread1e3: 3.2, spread1e6: 1.8 },
      { fromDeg: 0.3, toDeg: 1, meanDb: [-30, -30, -30, -30, -30], spread1e3: 2.7, spread1e6: 1.6 },
      { fromDeg: 1, toDeg: null, meanDb: [-15, -19, -22, -24, -26], spread1e3: 2, spread1e6: 1.3 },
    ],
    farmland: [
      { fromDeg: 0, toDeg: 0.4, meanDb: [-51, -39, -30, -30, -30], spread1e3: 5.4, spread1e6: 2.8 },
      { fromDeg: 0.4, toDeg: 0.75, meanDb: [-30, -30, -30, -30, -30], spread1e3: 4, spread1e6: 2.6 },
      { fromDeg: 0.75, toDeg: 1.5, meanDb: [-30, -30, -30, -30, -30], spread1e3: 3.3, spread1e6: 2.4 },
    ],
    'open ground': [
      { fromDeg: 0, toDeg: 0.25, meanDb: [-68, -74, -68, -51, -42], spread1e3: 3.8, spread1e6: 1.8 },
      { fromDeg: 0.25, toDeg: 0.75, meanDb: [-56, -58, -46, -41, -36], spread1e3: 2.7, spread1e6: 1.6 },
      { fromDeg: 0.75, toDeg: null, meanDb: [-38, -40, -40, -38, -26], spread1e3: 2, spread1e6: 1.3 },
    ],
    'rural high relief': [
      { fromDeg: 0, toDeg: 2, meanDb: [-27, -27, -27, -27, -27], spread1e3: 2.2, spread1e6: 1.4 },
      { fromDeg: 2, toDeg: 4, meanDb: [-24, -24, -24, -24, -24], spread1e3: 1.8, spread1e6: 1.3 },
      { fromDeg: 4, toDeg: 6, meanDb: [-21, -21, -21, -21, -21], spread1e3: 1.6, spread1e6: 1.2 },
      { fromDeg: 6, toDeg: null, meanDb: [-19, -19, -19, -19, -19], spread1e3: 1.5, spread1e6: 1.1 },
    ],
    'forest high relief': [{ fromDeg: null, toDeg: null, meanDb: [-15, -19, -22, -22, -22], spread1e3: 1.8, spread1e6: 1.3 }],
    mountains: [{ fromDeg: null, toDeg: null, meanDb: [-8, -11, -18, -20, -20], spread1e3: 2.8, spread1e6: 1.6 }],
    urban: [
      { fromDeg: 0, toDeg: 0.25, meanDb: [-20, -20, -20, -20, -20], spread1e3: 4.3, spread1e6: 2.8 },
      { fromDeg: 0.25, toDeg: 0.75, meanDb: [-20, -20, -20, -20, -20], spread1e3: 3.7, spread1e6: 2.4 },
      { fromDeg: 0.75, toDeg: null, meanDb: [-20, -20, -20, -20, -20], spread1e3: 3, spread1e6: 2 },
    ],
    'urban over open ground': [{ fromDeg: 0, toDeg: 0.25, meanDb: [-32, -24, -15, -10, -10], spread1e3: 4.3, spread1e6: 2.8 }],
    // Low confidence.
    'rural negative depression': [
      { fromDeg: null, toDeg: -0.75, meanDb: [-26, -26, -26, -26, -26], spread1e3: 2.3, spread1e6: 1.7 },
      { fromDeg: -0.75, toDeg: -0.25, meanDb: [-27, -27, -27, -27, -27], spread1e3: 3.3, spread1e6: 1.9 },
      { fromDeg: -0.25, toDeg: 0, meanDb: [-31, -31, -31, -31, -31], spread1e3: 3.4, spread1e6: 2 },
    ],
  },
}
