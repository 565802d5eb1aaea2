/**
 * One row of a circular, symmetric weighting over rows: out[j] = Σₙ w[n]·rows[(i+n)·length + j], n from −half to half, rows wrapping round. Pairs
 * of rows share a weight and go four pairs at a time, because this is the longest loop of an option.
 */
export function azimuthSum(rows: Float32Array, count: number, i: number, weights: Float64Array, out: Float64Array): void {
  const length = out.length
  const half = weights.length >> 1
  const at = (n: number) => ((i + n + count) % count) * length
  scaleRow(out, rows, at(0), weights[half])
  let n = half
  for (; n >= 4; n -= 4) {
    const w = half - n
    addFourPairs(out, rows, at(-n), at(1 - n), at(2 - n), at(3 - n), at(n - 3), at(n - 2), at(n - 1), at(n), weights, w)
  }
  for (; n > 0; n--) addPair(out, rows, at(-n), at(n), weights[half - n])
}

function scaleRow(out: Float64Array, rows: Float32Array, from: number, w: number): void {
  for (let j = 0; j < out.length; j++) out[j] = w * rows[from + j]
}

function addPair(out: Float64Array, rows: Float32Array, a: number, b: number, w: number): void {
  for (let j = 0; j < out.length; j++) out[j] += w * (rows[a + j] + rows[b + j])
}

function addFourPairs(
  out: Float64Array,
  rows: Float32Array,
  a: number,
  b: number,
  c: number,
  d: number,
  e: number,
  f: number,
  g: number,
  h: number,
  weights: Float64Array,
  from: number,
): void {
  const w = weights[from]
  const x = weights[from + 1]
  const y = weights[from + 2]
  const z = weights[from + 3]
  const n = out.length
  for (let j = 0; j < n; j++)
    out[j] +=
      w * (rows[a + j] + rows[h + j]) + x * (rows[b + j] + rows[g + j]) + y * (rows[c + j] + rows[f + j]) + z * (rows[d + j] + rows[e + j])
}
