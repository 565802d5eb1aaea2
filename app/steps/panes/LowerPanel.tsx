import { useEffect, useLayoutEffect, useRef, useState } from 'react'
import type { CellLedger, Profile } from '../../../core/index.ts'
import { terrainChart } from '../../charts/index.ts'
import { moveCursor, TerrainChart } from '../../charts/printers.tsx'
import type { MapHub } from '../../map/index.ts'
import { Notice } from '../../ui/index.ts'
import { formatAzimuth, formatMast, textOf } from '../../words/index.ts'
import { Explain } from '../compare/Explain.tsx'
import { sentenceOf, useResults, useSession, useView } from '../session/index.ts'
import { Ledger } from './Ledger.tsx'

/** What stands over the lower half of the map: the terrain profile of an azimuth, the ledger of a cell, or what a figure means. */
export function LowerPanel({ hub }: { hub: MapHub }) {
  const chart = useView((v) => v.chart)
  if (chart === 'figure') return <Explain />
  return chart === 'ledger' ? <LedgerPanel /> : <ProfilePanel hub={hub} />
}

function LedgerPanel() {
  const { client } = useSession()
  const option = useView((v) => v.option)
  const cell = useView((v) => v.cell)
  const serial = useResults((r) => r.serial)
  const [ledger, setLedger] = useState<CellLedger | null>(null)
  const [trouble, setTrouble] = useState('')
  // biome-ignore lint/correctness/useExhaustiveDependencies: new figures make the ledger worth asking for again
  useEffect(() => {
    if (!option || !cell) return
    let wanted = true
    client.ask('ledger', { at: cell, option }).then(
      (answer) => {
        if (!wanted || !answer) return
        setLedger(answer)
        setTrouble('')
      },
      (error) => wanted && setTrouble(sentenceOf(error)),
    )
    return () => {
      wanted = false
    }
  }, [client, option, cell, serial])
  if (trouble) return <Notice tone="bad">{trouble}</Notice>
  return ledger ? <Ledger ledger={ledger} /> : <p className="ink-3">Reading the cell</p>
}

function ProfilePanel({ hub }: { hub: MapHub }) {
  const { client } = useSession()
  const option = useView((v) => v.option)
  const azimuthDeg = useView((v) => v.profileAzimuthDeg)
  const units = useView((v) => v.units)
  const serial = useResults((r) => r.serial)
  const [profile, setProfile] = useState<Profile | null>(null)
  const [trouble, setTrouble] = useState('')
  const box = useRef<HTMLDivElement>(null)
  const cursor = useRef<SVGLineElement>(null)
  const [size, setSize] = useState({ width: 0, height: 0 })
  // biome-ignore lint/correctness/useExhaustiveDependencies: new figures make the profile worth asking for again
  useEffect(() => {
    if (!option || azimuthDeg === null) return
    let wanted = true
    client.ask('profile', { azimuthDeg, option }).then(
      (answer) => {
        if (!wanted || !answer) return
        setProfile(answer)
        setTrouble('')
      },
      (error) => wanted && setTrouble(sentenceOf(error)),
    )
    return () => {
      wanted = false
    }
  }, [client, option, azimuthDeg, serial])
  useLayoutEffect(() => {
    const element = box.current
    if (!element) return
    const watch = new ResizeObserver(([entry]) =>
      setSize({ width: Math.floor(entry.contentRect.width), height: Math.floor(entry.contentRect.height) }),
    )
    watch.observe(element)
    return () => watch.disconnect()
  }, [])
  useEffect(() => {
    if (!profile || size.width === 0) return
    const { range } = terrainChart({ profile, ...size, system: units, size: 12 })
    return hub.pointer.listen((p) => {
      const near = p && p.azimuthDeg !== null && Math.abs(((p.azimuthDeg - profile.azimuthDeg + 540) % 360) - 180) < 2
      moveCursor(cursor.current, range, p && p.from !== 'profile' && near ? p.rangeM : null)
    })
  }, [hub, profile, size, units])
  return (
    <div className="profile">
      <h3>
        Terrain profile, azimuth {textOf(formatAzimuth(azimuthDeg))}, {option?.candidate} at{' '}
        {option ? textOf(formatMast(option.heightM)) : ''}
      </h3>
      {trouble ? <Notice tone="bad">{trouble}</Notice> : null}
      <div className="plot-box" ref={box}>
        {profile && size.width > 0 && size.height > 60 ? (
          <TerrainChart
            profile={profile}
            width={size.width}
            height={size.height}
            system={units}
            size={12}
            cursorRef={cursor}
            onPoint={(rangeM) => {
              hub.pointer.set(rangeM === null ? null : { from: 'profile', at: null, azimuthDeg: profile.azimuthDeg, rangeM })
              moveCursor(cursor.current, terrainChart({ profile, ...size, system: units, size: 12 }).range, rangeM)
            }}
          />
        ) : null}
      </div>
    </div>
  )
}
