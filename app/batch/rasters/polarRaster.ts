import { DEG_PER_RAD, type GridShape, type LonLat, type PolarShape, wrap360 } from '../../../core/index.ts'
import { eachFromSite } from './mapLattice.ts'

/** Polar cell under the centre of each cell of a lattice; -1 beyond the grid. Made once per candidate. */
export function polarCells(shape: GridShape, site: LonLat, grid: PolarShape): Int32Array {
  const { azimuths, ranges, azimuthStepDeg, rangeStepM } = grid
  const out = new Int32Array(shape.width * shape.height).fill(-1)
  eachFromSite(shape, site, (cell, east, north) => {
    const j = Math.floor(Math.hypot(east, north) / rangeStepM)
    if (j >= ranges) return
    const i = Math.round(wrap360(Math.atan2(east, north) * DEG_PER_RAD) / azimuthStepDeg) % azimuths
    out[cell] = i * ranges + j
  })
  return out
}

/** Values of a polar grid on the lattice: each cell takes the polar cell its centre lies in; NaN beyond the grid. */
export function polarRaster(cells: Int32Array, values: Float32Array): Float32Array {
  const out = new Float32Array(cells.length)
  for (let n = 0; n < cells.length; n++) {
    const from = cells[n] as number
    out[n] = from < 0 ? Number.NaN : (values[from] as number)
  }
  return out
}
