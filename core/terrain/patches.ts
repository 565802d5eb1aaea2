/** What the walk writes: one entry per grid line crossed, with the start, the control points and the end. */
export interface Walk {
  count: number
  end: number
  /** Distance, ground height and bend to the next entry: three numbers per entry. */
  readonly ground: Float64Array
  /** Kept only for ground with cover. */
  readonly patches: WalkedPatches | null
}
/** For each entry the patch ahead (its first post), the place in it (columns, rows from that post, 0..1) and twist -> bend, 1/m². */
export interface WalkedPatches {
  readonly post: Int32Array
  readonly u: Float64Array
  readonly v: Float64Array
  readonly bendPerTwist: Float64Array
}

/** Notes the patch of an entry from its first post in the raster's own order; `near` is the post the ray comes from, u and v grow along the ray. */
export function keepPatch(
  p: WalkedPatches,
  k: number,
  near: number,
  u: number,
  v: number,
  right: boolean,
  down: boolean,
  width: number,
  bendPerTwist: number,
): void {
  p.post[k] = near - (right ? 0 : 1) - (down ? 0 : width)
  p.u[k] = right ? u : 1 - u
  p.v[k] = down ? v : 1 - v
  p.bendPerTwist[k] = right === down ? bendPerTwist : -bendPerTwist
}
