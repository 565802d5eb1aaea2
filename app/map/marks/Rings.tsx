import { memo, useMemo } from 'react'
import { geodesicDirect, type LonLat, pixelAtLonLat, type View } from '../../../core/index.ts'
import { ringStep, ringText, type UnitSystem } from '../../words/index.ts'
import { ringPath } from './worldPaths.ts'

const wide = { vectorEffect: 'non-scaling-stroke' } as const
/** Most rings inside the range of the grid. */
const MOST = 5

export const ringsOf = (maxRangeM: number, units: UnitSystem): number[] => {
  const step = ringStep(maxRangeM, units, MOST)
  const rings: number[] = []
  for (let r = step; r < maxRangeM * 0.999; r += step) rings.push(r)
  return rings
}

/** Range rings in world metres from the site; the parent group scales them. The outermost is where the polar grid ends. */
export const Rings = memo(function Rings({ site, maxRangeM, units }: { site: LonLat; maxRangeM: number; units: UnitSystem }) {
  const paths = useMemo(() => ringsOf(maxRangeM, units).map((r) => ({ r, d: ringPath(site, r) })), [site, maxRangeM, units])
  const end = useMemo(() => ringPath(site, maxRangeM), [site, maxRangeM])
  return (
    <g className="rings">
      {paths.map((p) => (
        <path key={p.r} d={p.d} {...wide} />
      ))}
      <path className="end" d={end} {...wide} />
    </g>
  )
})

export interface Rect {
  readonly left: number
  readonly top: number
  readonly right: number
  readonly bottom: number
}
/** Directions tried for a ring's label: north first, then either side of it, south last. */
const TRIED = [0, 20, 340, 45, 315, 90, 270, 70, 290, 135, 225, 160, 200, 180, 110, 250]

/** Where each ring is labelled: the first direction where the label lies inside the view and touches no card and no other mark. */
export function ringLabels(
  view: View,
  site: LonLat,
  ranges: readonly number[],
  taken: readonly Rect[],
): { readonly rangeM: number; readonly x: number; readonly y: number }[] {
  const used: Rect[] = [...taken]
  const out: { rangeM: number; x: number; y: number }[] = []
  for (const rangeM of ranges) {
    for (const azimuthDeg of TRIED) {
      const [x, y] = pixelAtLonLat(view, geodesicDirect(site, azimuthDeg, rangeM))
      const box = { left: x - 25, right: x + 25, top: y - 9, bottom: y + 9 }
      if (box.left < 4 || box.right > view.width - 4 || box.top < 4 || box.bottom > view.height - 4) continue
      if (used.some((u) => box.left < u.right && u.left < box.right && box.top < u.bottom && u.top < box.bottom)) continue
      used.push(box)
      out.push({ rangeM, x, y })
      break
    }
  }
  return out
}
export function RingLabels({ labels, units }: { labels: ReturnType<typeof ringLabels>; units: UnitSystem }) {
  return (
    <g className="ring-labels">
      {labels.map((l) => (
        <text key={l.rangeM} x={l.x} y={l.y + 4} textAnchor="middle">
          {ringText(l.rangeM, units)}
        </text>
      ))}
    </g>
  )
}
