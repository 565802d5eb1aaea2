import { pdCurve, type RequiredRatio } from '../../detection/index.ts'

const curves = new WeakMap<RequiredRatio, (marginDb: number) => number>()
/** `pdCurve` of a need, made once. */
export function pdOf(required: RequiredRatio): (marginDb: number) => number {
  let curve = curves.get(required)
  if (!curve) {
    curve = pdCurve(required)
    curves.set(required, curve)
  }
  return curve
}
