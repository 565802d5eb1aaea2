import { useCallback, useEffect, useRef, useState } from 'react'
import type { Profile } from '../../../../core/index.ts'
import { profileCsv, type TerrainGeometry, terrainChart } from '../../../charts/index.ts'
import { moveCursor, TerrainChart } from '../../../charts/printers.tsx'
import type { MapHub } from '../../../map/index.ts'
import { CHART_WORDS, formatBand, formatFloor, formatHeight, formatPlaceRange, textOf, type UnitSystem } from '../../../words/index.ts'
import { useView } from '../../session/index.ts'
import { AzimuthField, ChartFrame, ZoomButtons } from './ChartFrame.tsx'
import { CopyButtons } from './CopyButtons.tsx'
import { useAnswer } from './useAnswer.ts'

const SIZE = 12
/** Least stretch of range that is shown, m. */
const LEAST_M = 200

/** Terrain profile of one azimuth as the antenna sees it. */
export function ProfilePane({ hub }: { hub: MapHub }) {
  const option = useView((v) => v.option)
  const azimuthDeg = useView((v) => v.profileAzimuthDeg) ?? 0
  const units = useView((v) => v.units)
  const [target, setTarget] = useState<{ rangeM: number; heightM: number } | null>(null)
  const [zoom, setZoom] = useState<readonly [number, number] | null>(null)
  const { answer: profile, trouble } = useAnswer('profile', option ? { azimuthDeg, option, ...(target ? { target } : {}) } : null)
  const cursor = useRef<SVGLineElement>(null)
  const read = useRef<HTMLParagraphElement>(null)
  const shown = useRef<TerrainGeometry | null>(null)
  const reading = useRef<number | null>(null)
  const show = useCallback(
    (rangeM: number | null, tell: boolean) => {
      reading.current = rangeM
      if (!profile || !shown.current) return
      moveCursor(cursor.current, shown.current.range, rangeM)
      const i = rangeM === null ? -1 : shown.current.indexAt(rangeM)
      if (read.current) read.current.textContent = i < 0 ? CHART_WORDS.pointHint : profileWords(profile, i, units)
      if (tell) hub.pointer.set(rangeM === null ? null : { from: 'profile', at: null, azimuthDeg: profile.azimuthDeg, rangeM })
    },
    [profile, hub, units],
  )
  useEffect(() => {
    if (!profile) return
    show(null, false)
    return hub.pointer.listen((p) => {
      if (p?.from === 'profile') return
      const near = p && p.azimuthDeg !== null && Math.abs(((p.azimuthDeg - profile.azimuthDeg + 540) % 360) - 180) < 2
      show(near ? p.rangeM : null, false)
    })
  }, [hub, profile, show])
  const farM = profile && profile.distM.length > 0 ? profile.distM[profile.distM.length - 1] : 0
  const [fromM, toM] = zoom ?? [0, farM]
  const zoomBy = (factor: number) => {
    const about = reading.current ?? fromM
    const length = Math.max(LEAST_M, (toM - fromM) * factor)
    if (length >= farM) return setZoom(null)
    const start = Math.min(farM - length, Math.max(0, about - ((about - fromM) / (toM - fromM)) * length))
    setZoom([start, start + length])
  }
  const onKey = (key: string, shift: boolean): boolean => {
    if (!profile) return false
    const step = ((toM - fromM) / 200) * (shift ? 10 : 1)
    const inside = (m: number) => Math.min(toM, Math.max(fromM, m))
    if (key === 'ArrowLeft') show(inside((reading.current ?? (fromM + toM) / 2) - step), true)
    else if (key === 'ArrowRight') show(inside((reading.current ?? (fromM + toM) / 2) + step), true)
    else if (key === '+' || key === '=') zoomBy(1 / 1.5)
    else if (key === '-') zoomBy(1.5)
    else if (key === '0') setZoom(null)
    else return false
    return true
  }
  return (
    <ChartFrame
      name="profile"
      readRef={read}
      onKey={onKey}
      trouble={trouble}
      topics={['floor']}
      tools={
        <>
          <AzimuthField />
          <ZoomButtons onZoom={zoomBy} onWhole={() => setZoom(null)} zoomed={zoom !== null} />
        </>
      }
      copy={
        <CopyButtons
          name={`profile-${Math.round(azimuthDeg)}`}
          drawing={() => shown.current?.drawing ?? null}
          csv={() => profile && profileCsv(profile)}
        />
      }
    >
      {({ width, height }) => {
        if (!profile) return <p className="ink-3">{CHART_WORDS.drawing}</p>
        const input = { profile, width, height, system: units, size: SIZE, ...(zoom ? { window: zoom } : {}) }
        shown.current = terrainChart(input)
        return (
          <TerrainChart
            {...input}
            cursorRef={cursor}
            onPoint={(rangeM) => show(rangeM, true)}
            onPickPlace={(x, y) => {
              const g = shown.current
              if (g) setTarget(g.placeAt(x, y))
            }}
          />
        )
      }}
    </ChartFrame>
  )
}

function profileWords(p: Profile, i: number, units: UnitSystem): string {
  const parts = [textOf(formatPlaceRange(p.distM[i], units))]
  if (Number.isNaN(p.groundM[i])) return `${parts[0]} · ${CHART_WORDS.unknown}`
  parts.push(`${CHART_WORDS.ground} ${textOf(formatHeight(p.groundM[i], units))}`)
  if (p.surfaceM[i] > p.groundM[i] + 0.05) parts.push(`${CHART_WORDS.surface} ${textOf(formatHeight(p.surfaceM[i], units))}`)
  parts.push(p.inSight[i] === 1 ? CHART_WORDS.inSight : p.inSight[i] === 0 ? CHART_WORDS.masked : CHART_WORDS.unknown)
  if (!Number.isNaN(p.floorM[i]))
    parts.push(`${CHART_WORDS.floor} ${textOf(formatFloor(p.floorM[i], units))} ± ${textOf(formatBand(p.floorBandM[i], units))}`)
  const { ray } = p
  if (ray && p.distM[i] < ray.toRangeM && Number.isFinite(ray.heightM[i])) {
    const clear = ray.heightM[i] - p.surfaceM[i]
    const share = ray.fresnelM[i] > 0 ? clear / ray.fresnelM[i] : Number.POSITIVE_INFINITY
    parts.push(CHART_WORDS.fresnelOf(Math.abs(share) >= 10 ? null : Math.floor(share * 100)))
  }
  return parts.join(' · ')
}
