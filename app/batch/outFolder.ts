import { chmodSync, mkdirSync, mkdtempSync, readdirSync, readFileSync, renameSync, rmdirSync, rmSync, statSync } from 'node:fs'
import { basename, dirname, join, resolve } from 'node:path'
import { InputError } from '../../core/index.ts'

/** What summary.json begins with: by this an earlier run is known as ours. */
export const SUMMARY_FORMAT = 'sightfell-run'

/** A folder that appears whole or not at all: written beside its place and renamed at the end. */
export interface OutFolder {
  /** Where to write meanwhile. */
  readonly workDir: string
  /** Puts the folder in its place; an earlier run is replaced. */
  finish(): void
}

const kindOf = (path: string): 'none' | 'folder' | 'other' => {
  try {
    return statSync(path).isDirectory() ? 'folder' : 'other'
  } catch {
    return 'none'
  }
}
function isEarlierRun(dir: string): boolean {
  try {
    return (JSON.parse(readFileSync(join(dir, 'summary.json'), 'utf8')) as { format?: unknown }).format === SUMMARY_FORMAT
  } catch {
    return false
  }
}

/**
 * Makes ready to write a run to `dir`, which must be new, empty or an earlier run. What was written is removed when the program ends before finish().
 * @throws InputError where the folder is something else or cannot be made
 */
export function openOutFolder(dir: string): OutFolder {
  const place = resolve(dir)
  const fault = (found: string) =>
    new InputError({
      code: 'out',
      place: `--out ${basename(place)}`,
      found,
      remedy: 'name a new or empty folder, or one of an earlier run',
    })
  const kind = kindOf(place)
  if (kind === 'other') throw fault('this is a file')
  if (kind === 'folder' && readdirSync(place).length > 0 && !isEarlierRun(place)) throw fault('the folder holds other files')
  const parent = dirname(place)
  let workDir: string
  try {
    mkdirSync(parent, { recursive: true })
    workDir = mkdtempSync(join(parent, `.${basename(place)}-part-`))
    chmodSync(workDir, 0o777 & ~process.umask())
  } catch (error) {
    throw fault(`nothing can be written beside it (${(error as NodeJS.ErrnoException).code ?? 'unknown reason'})`)
  }
  const abandon = () => rmSync(workDir, { recursive: true, force: true })
  process.on('exit', abandon)
  return {
    workDir,
    finish() {
      if (kindOf(place) === 'folder') {
        if (readdirSync(place).length === 0) rmdirSync(place)
        else {
          const old = mkdtempSync(join(parent, `.${basename(place)}-old-`))
          renameSync(place, join(old, 'run'))
          renameSync(workDir, place)
          rmSync(old, { recursive: true, force: true })
          process.off('exit', abandon)
          return
        }
      }
      renameSync(workDir, place)
      process.off('exit', abandon)
    },
  }
}
