import type { VerticalCut } from '../../../core/index.ts'
import { toFace, type UnitSystem } from '../../words/index.ts'
import { type Box, type Point, type Scale, scaleOf } from '../drawing.ts'

export interface VerticalInput {
  readonly cut: VerticalCut
  readonly width: number
  readonly height: number
  readonly system: UnitSystem
  /** Text size, in the drawing's unit. */
  readonly size: number
}
/**
 * Where ranges and heights stand: rays are straight, so the effective earth falls away under them and lines of equal height bend down. `up` is in
 * face units of height over the tangent at the antenna.
 */
export interface Frame {
  readonly box: Box
  readonly range: Scale
  readonly up: Scale
  readonly fromM: number
  readonly toM: number
  readonly bottomM: number
  readonly topM: number
  place(rangeM: number, heightM: number): Point
  /** Height, m MSL, of a place of the drawing at a range, m. */
  heightAt(rangeM: number, y: number): number
}

export function frameOf({ cut, width, height, system, size }: VerticalInput): Frame {
  const { rangeM, heightM } = cut
  const step = rangeM.length > 1 ? rangeM[1] - rangeM[0] : 1
  const fromM = rangeM[0] - step / 2
  const toM = rangeM[rangeM.length - 1] + step / 2
  const bottomM = heightM[0]
  const topM = heightM[heightM.length - 1]
  const dropM = (r: number): number => (Number.isFinite(cut.effectiveRadiusM) ? (r * r) / (2 * cut.effectiveRadiusM) : 0)
  const box: Box = { left: 4.4 * size, right: width - 1.4 * size, top: 2 * size, bottom: height - 3 * size }
  const range = scaleOf(fromM, toM, box.left, box.right)
  const face = (m: number): number => toFace('height', m, system)
  const up = scaleOf(face(bottomM - dropM(toM)), face(topM - dropM(fromM)), box.bottom, box.top)
  const perFace = face(1)
  return {
    box,
    range,
    up,
    fromM,
    toM,
    bottomM,
    topM,
    place: (r, h) => [range.at(r), up.at(face(h - dropM(r)))],
    heightAt: (r, y) => up.invert(y) / perFace + dropM(r),
  }
}
