import { differenceInfo, type OptionRef } from '../../core/index.ts'
import type { MapShow } from './types.ts'

/** The option whose layer is taken off that of the option on show; null where no difference is shown. */
export const differenceOn = (show: MapShow): OptionRef | null =>
  show.against && show.option && (show.beside ?? 'difference') === 'difference' && differenceInfo(show.layer) ? show.against : null
