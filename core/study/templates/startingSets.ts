import { M_PER_FT, M_PER_NM } from '../../units/index.ts'
import type { NeedDoc } from '../types.ts'
import { filled, type NeedTemplate, type StartingSet, type TemplateValue } from './types.ts'

const value = (path: string, v: unknown, basis: TemplateValue['basis'], source: string): TemplateValue => ({
  path,
  value: v,
  basis,
  source,
})
const layer = (name: string, values: readonly TemplateValue[]): NeedTemplate => ({ name, kind: 'layer', values })

const OFCOM = 'Ofcom primary-radar study'
const OWN_FLOOR = 'put the floor of your own requirement here'
const IMO = 'IMO MSC.192(79), table 2'
const WEATHER_TARGET = 'weather is no point target: read the share in sight'

/** Kinds of work, each a radar template and needs. Heights and ranges marked *chosen here* wait for the operational requirement. */
export const STARTING_SETS: readonly StartingSet[] = [
  {
    id: 'terminal',
    name: 'Terminal air traffic',
    radar: 'T1',
    needs: [
      layer('Vectoring area', [
        value('rcsM2', 1, 'read', `${OFCOM}: 1 to 3 m²`),
        value('swerling', 1, 'read', 'UK CAP 670, radar section 13'),
        value('pd', 0.9, 'read', `${OFCOM}: 90 % on 1 m², Pfa 1e-6`),
        value('heightM', [1500 * M_PER_FT, 15_000 * M_PER_FT], 'chosen here', `floor 1 500 ft: ${OWN_FLOOR}; ceiling 15 000 ft`),
        value('heightAbove', 'sea', 'chosen here', OWN_FLOOR),
        value('toRangeM', 40 * M_PER_NM, 'read', 'DTIC ADA072691: 1 m² to 40 NM, to 15 000 ft'),
      ]),
    ],
  },
  {
    id: 'enRoute',
    name: 'En-route air traffic',
    radar: 'E1',
    needs: [
      layer('Upper airspace', [
        value('rcsM2', 1, 'read', `${OFCOM}: 1 to 2 m²`),
        value('pd', 0.9, 'read', `${OFCOM}: 90 % on 1 m², Pfa 1e-6`),
        value('heightM', [5000 * M_PER_FT, 50_000 * M_PER_FT], 'read', `${OFCOM}: floor about 5 000 ft, to 50 000 ft`),
        value('heightAbove', 'sea', 'chosen here', OWN_FLOOR),
        value('fromRangeM', M_PER_NM, 'read', `${OFCOM}: 1 NM at the least`),
        value('toRangeM', 160 * M_PER_NM, 'read', `${OFCOM}: over 80, typically 160 NM`),
      ]),
    ],
  },
  {
    id: 'coastal',
    name: 'Coastal and vessel traffic',
    radar: 'V1',
    needs: [
      layer('Small craft with reflector', [
        value('rcsM2', 7.5, 'read', 'IMO radar reflector standard: 7.5 m² at X band, 4 m high'),
        value('pd', 0.8, 'read', 'IMO MSC.192(79), 5.3: 8 of 10 scans'),
        value('heightM', 4, 'read', IMO),
        value('heightAbove', 'sea', 'read', IMO),
        value('toRangeM', 5 * M_PER_NM, 'read', `${IMO}: 5.0 NM at X band`),
      ]),
      layer('Coaster', [
        value('rcsM2', 1000, 'from memory', 'IALA G1111 target classes'),
        value('pd', 0.8, 'read', 'IMO MSC.192(79), 5.3: 8 of 10 scans'),
        value('heightM', 8, 'from memory', 'IALA G1111 target classes'),
        value('heightAbove', 'sea', 'from memory', 'IALA G1111 target classes'),
        value('toRangeM', 11 * M_PER_NM, 'read', `${IMO}: 11 NM for a ship 10 m high`),
      ]),
    ],
  },
  {
    id: 'weather',
    name: 'Weather',
    radar: 'W1',
    needs: [1000, 3000].map((heightM) =>
      layer(heightM === 1000 ? '1 km above ground' : '3 km above sea', [
        value('heightM', heightM, 'read', 'Maddox and others 2002: charts at 3 and 5 km above sea and 1, 2, 3 km above ground'),
        value('heightAbove', heightM === 1000 ? 'ground' : 'sea', 'read', 'Maddox and others 2002'),
        value('toRangeM', 100_000, 'chosen here', 'put the range of your own network plan here'),
        value('rcsM2', 1, 'chosen here', WEATHER_TARGET),
        value('pd', 0.8, 'chosen here', WEATHER_TARGET),
      ]),
    ),
  },
  {
    id: 'birdDrone',
    name: 'Birds and drones',
    radar: 'B1',
    needs: [
      layer('Large bird or small drone', [
        value('rcsM2', 0.01, 'from memory', 'birds 0.001 to 0.01 m², drones 0.01 to 0.05 m²'),
        value('heightM', [30, 150], 'chosen here', OWN_FLOOR),
        value('heightAbove', 'ground', 'chosen here', OWN_FLOOR),
        value('toRangeM', 1500, 'read', 'published bird monitoring set: 1.5 km'),
        value('pd', 0.8, 'chosen here', 'put the requirement here'),
      ]),
    ],
  },
]

/**
 * Needs of a starting set as the study writes them, ids n1, n2, …, with their origins.
 * @throws Error for an id that no set has
 */
export function needsOfSet(id: string): NeedDoc[] {
  const set = STARTING_SETS.find((s) => s.id === id)
  if (!set) throw new Error(`no starting set ${id}`)
  return set.needs.map((n, i) => filled<NeedDoc>({ id: `n${i + 1}`, name: n.name, must: true, kind: n.kind }, n.values))
}
