import { cellLedger, clutterOptions, siteOf } from '../../../core/index.ts'
import { type CommandLine, numberOption, usageError } from '../arguments.ts'
import { loadGround } from '../loadGround.ts'
import { candidateNamed, heightOption, loadStudy, sayWarnings, tiltOption } from '../loadStudy.ts'
import type { Progress } from '../progress.ts'

/** `cell`: the ledger of one place as JSON. */
export async function cell(line: CommandLine, progress: Progress): Promise<void> {
  const loaded = await loadStudy(line.study)
  const candidate = candidateNamed(loaded, line.options.candidate as string)
  const heightM = heightOption(line.options.height as string)
  const tiltDeg = tiltOption(line.options.tilt, candidate)
  const parts = (line.options.at as string).split(',')
  if (parts.length !== 2)
    throw usageError('--at', `found "${line.options.at?.slice(0, 40)}"`, 'give longitude and latitude in degrees: --at LON,LAT')
  const at = {
    lon: numberOption('at', parts[0] as string, -360, 360, 'longitude'),
    lat: numberOption('at', parts[1] as string, -90, 90, 'latitude'),
  }
  const { ground, read, warnings } = await loadGround(loaded, [candidate], progress)
  const { study } = loaded
  const ledger = cellLedger(
    ground,
    study,
    { candidate: candidate.id, heightM, tiltDeg },
    at,
    clutterOptions(study, ground, read.landTable, siteOf(candidate), heightM, 'always'),
  )
  process.stdout.write(`${JSON.stringify(ledger, null, 2)}\n`)
  sayWarnings([...loaded.warnings, ...warnings])
}
