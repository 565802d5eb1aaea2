import { earthOf, type HorizonRow, horizonAt, siteOf } from '../../../core/index.ts'
import { type CommandLine, numberOption, usageError } from '../arguments.ts'
import { csvLine, csvNumber } from '../csv.ts'
import { loadGround } from '../loadGround.ts'
import { candidateNamed, heightOption, loadStudy, sayWarnings } from '../loadStudy.ts'
import { makeTurns, type Progress } from '../progress.ts'

export const HORIZON_COLUMNS = ['azimuth_deg', 'elevation_deg', 'range_m', 'height_m', 'lon', 'lat', 'obstacle'] as const
const MOST_AZIMUTHS = 360_000
/** Azimuths between two turns of the event loop. */
const BATCH = 360

/** Rows of a horizon as CSV. */
export const horizonCsv = (rows: readonly HorizonRow[]): string =>
  [
    csvLine(HORIZON_COLUMNS),
    ...rows.map((r) =>
      csvLine([
        csvNumber(r.azimuthDeg, 5),
        csvNumber(r.elevationDeg, 5),
        csvNumber(r.rangeM, 3),
        csvNumber(r.heightM, 3),
        csvNumber(r.lon, 8),
        csvNumber(r.lat, 8),
        r.obstacle,
      ]),
    ),
  ].join('')

function azimuthsAsked(step: string | undefined, list: string | undefined): number[] {
  if (list !== undefined) {
    if (step !== undefined) throw usageError('--step', 'given together with --azimuths', 'give one of the two')
    return list.split(',').map((text) => numberOption('azimuths', text, -360, 720, 'azimuth'))
  }
  const stepDeg = step === undefined ? 1 : numberOption('step', step, 360 / MOST_AZIMUTHS, 360, 'azimuth step')
  return Array.from({ length: Math.ceil(360 / stepDeg - 1e-9) }, (_, n) => n * stepDeg)
}

/** `horizon`: the screening point at each azimuth, each on its own ray, to the end of the terrain or the range of the grid. */
export async function horizon(line: CommandLine, progress: Progress): Promise<void> {
  const loaded = await loadStudy(line.study)
  const candidate = candidateNamed(loaded, line.options.candidate as string)
  const heightM = heightOption(line.options.height as string)
  const azimuths = azimuthsAsked(line.options.step, line.options.azimuths)
  const { ground, warnings } = await loadGround(loaded, [candidate], progress)
  progress.inputIsGood()
  const turn = makeTurns(progress, 'Horizon')
  const rows: HorizonRow[] = []
  for (let at = 0; at < azimuths.length; at += BATCH) {
    const asked = azimuths.slice(at, at + BATCH)
    rows.push(...horizonAt(ground, siteOf(candidate), heightM, earthOf(loaded.study), asked, loaded.study.run.maxRangeM))
    await turn(rows.length, azimuths.length)
  }
  process.stdout.write(horizonCsv(rows))
  sayWarnings([...loaded.warnings, ...warnings])
}
