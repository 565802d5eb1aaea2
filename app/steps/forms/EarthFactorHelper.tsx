import { useState } from 'react'
import { earthFactorOfAir, effectiveEarthFactor, type Limit } from '../../../core/index.ts'
import { setField } from '../../document/index.ts'
import { Button, NumberField } from '../../ui/index.ts'
import { formatK, formatNumber } from '../../words/index.ts'
import { useSession } from '../session/index.ts'

const limit = (what: string, unit: string, low: number, high: number): Limit => ({ what, unit, low, high })
const FIELDS = [
  { key: 'temperatureC', label: 'Temperature', unit: '°C', limit: limit('temperature', '°C', -40, 50) },
  { key: 'pressureHpa', label: 'Pressure', unit: 'hPa', limit: limit('pressure', 'hPa', 500, 1100) },
  { key: 'relativeHumidityPct', label: 'Humidity', unit: '%', limit: limit('relative humidity', '%', 0, 100) },
] as const
type Air = Partial<Record<(typeof FIELDS)[number]['key'], number>>

/** k from the air at the ground, or from a measured gradient; taken into the study by a press. */
export function EarthFactorHelper() {
  const { study } = useSession()
  const [air, setAir] = useState<Air>({})
  const [gradient, setGradient] = useState<number | undefined>()
  const { temperatureC, pressureHpa, relativeHumidityPct } = air
  const whole = temperatureC !== undefined && pressureHpa !== undefined && relativeHumidityPct !== undefined
  const fromAir = whole ? earthFactorOfAir({ temperatureC, pressureHpa, relativeHumidityPct }) : null
  const dN = gradient ?? fromAir?.gradientNPerKm
  const k = dN === undefined ? undefined : effectiveEarthFactor(dN)
  const words =
    dN === undefined
      ? 'Give the air at the ground, or a measured gradient'
      : `${fromAir && gradient === undefined ? `N ${formatNumber(fromAir.surfaceN)}, ` : ''}gradient ${formatNumber(dN, 1)} N/km: ${k == null ? 'ducting, no k exists' : `k ${formatK(k)}`}`
  return (
    <>
      {FIELDS.map((f) => (
        <NumberField
          key={f.key}
          label={f.label}
          value={air[f.key]}
          face={{ unit: f.unit, size: 1 }}
          limit={f.limit}
          onCommit={(v) => setAir((now) => ({ ...now, [f.key]: v }))}
        />
      ))}
      <NumberField
        label="Measured gradient"
        value={gradient}
        fallbackWords="instead"
        face={{ unit: 'N/km', size: 1 }}
        limit={limit('gradient', 'N/km', -1000, 1000)}
        onCommit={setGradient}
      />
      <div className="row add">
        <Button
          small
          disabled={k == null}
          onPress={() => k != null && setField(study, 'atmosphere.effectiveEarthFactor', Number(k.toFixed(4)), 'took k from the air')}
        >
          Use this k
        </Button>
        <span className="small ink-2">{words}</span>
      </div>
    </>
  )
}
