import { describe, expect, it } from 'vitest'
import { figureWords, needKey, textOf } from '../../app/words/index.ts'

describe('words of figures', () => {
  it('explain every key of a summary', () => {
    const keys = [
      ...['site_ground_m', 'antenna_m', 'ground_in_sight_km2', 'masked_km2', 'unknown_km2', 'horizon_median_deg', 'horizon_p90_deg'],
      ...['horizon_highest_deg', 'clutter_over_0_km2', 'clutter_over_60_km2', 'clutter_to_noise_peak_db', 'floor_20nm_worst_m'],
      ...['need_n1_in_sight_pct', 'need_n_1_suppression_needed_90_db', 'need_n1_worst_margin_m', 'need_n1_suppression_short_km2'],
      ...[
        'floor_20nm_k1_worst_m',
        'improvement_land_db',
        'need_n1_usable_k1_pct',
        'need_n1_lost_short_range_sensitivity_pct',
        'need_n1_longest_gap_s',
      ],
    ]
    for (const key of keys) expect(figureWords(key)?.meaning, key).toMatch(/\w/)
    expect(figureWords('something_else')).toBeUndefined()
  })
  it('need ids with underscores are whole', () => {
    expect(needKey('need_low_west_in_sight_pct')).toEqual({ needId: 'low_west', of: 'in_sight_pct' })
    expect(needKey('need_n1_unknown_km2')).toEqual({ needId: 'n1', of: 'unknown_km2' })
  })
  it('print to the safe side', () => {
    expect(textOf(figureWords('need_n1_in_sight_pct')!.format(87.9, 'metric'))).toMatch(/^87/)
    expect(textOf(figureWords('clutter_over_40_km2')!.format(147.1, 'metric'))).toMatch(/^148/)
  })
})
