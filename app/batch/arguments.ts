import { InputError } from '../../core/index.ts'

/** What follows the command, as written: each option at most once. */
export interface CommandLine {
  readonly command: Command
  readonly study: string
  readonly options: Readonly<Partial<Record<OptionName, string>>>
}
export const COMMANDS = ['run', 'points', 'horizon', 'cell'] as const
export type Command = (typeof COMMANDS)[number]
type OptionName = 'out' | 'candidate' | 'height' | 'tilt' | 'layers' | 'no-memo' | 'points' | 'step' | 'azimuths' | 'at'

/** Options of each command; those marked true must be given. */
const OPTIONS: Readonly<Record<Command, Readonly<Partial<Record<OptionName, boolean>>>>> = {
  run: { out: true, candidate: false, height: false, tilt: false, layers: false, 'no-memo': false },
  points: { candidate: true, height: true, tilt: false, points: true },
  horizon: { candidate: true, height: true, step: false, azimuths: false },
  cell: { candidate: true, height: true, tilt: false, at: true },
}
const FLAGS: ReadonlySet<string> = new Set(['no-memo'])
const HELP = 'see: npm run --silent study -- --help'

/** A fault of the command line itself. */
export const usageError = (place: string | undefined, found: string, remedy = HELP): InputError =>
  new InputError({ code: 'usage', ...(place === undefined ? {} : { place }), found, remedy })

/** Reads the words after `study --`. @throws InputError for an unknown command or option, one given twice, or one missing */
export function readArguments(words: readonly string[]): CommandLine | 'help' {
  if (words.length === 0 || words.includes('--help') || words.includes('-h') || words[0] === 'help') return 'help'
  const [command, ...rest] = words as [string, ...string[]]
  if (!COMMANDS.includes(command as Command))
    throw usageError(undefined, `unknown command "${command}"`, `use one of ${COMMANDS.join(', ')}`)
  const allowed = OPTIONS[command as Command]
  const options: Partial<Record<OptionName, string>> = {}
  const files: string[] = []
  for (let n = 0; n < rest.length; n++) {
    const word = rest[n] as string
    if (!word.startsWith('--')) {
      files.push(word)
      continue
    }
    const [name, inline] = word.slice(2).split(/=(.*)/s, 2) as [string, string | undefined]
    if (!Object.hasOwn(allowed, name))
      throw usageError(
        `--${name}`,
        `${command} has no such option`,
        `use ${Object.keys(allowed)
          .map((o) => `--${o}`)
          .join(', ')}`,
      )
    if (options[name as OptionName] !== undefined) throw usageError(`--${name}`, 'given twice', 'give it once')
    const value = inline ?? (FLAGS.has(name) ? 'yes' : rest[++n])
    if (value === undefined || (inline === undefined && !FLAGS.has(name) && value.startsWith('--')))
      throw usageError(`--${name}`, 'no value follows', `give a value after --${name}`)
    options[name as OptionName] = value
  }
  if (files.length !== 1)
    throw usageError(
      undefined,
      files.length === 0 ? 'no study file given' : `${files.length} study files given`,
      `name one study: ${command} STUDY.json …`,
    )
  for (const [name, needed] of Object.entries(allowed))
    if (needed && options[name as OptionName] === undefined) throw usageError(`--${name}`, 'is missing', `add --${name} to ${command}`)
  return { command: command as Command, study: files[0] as string, options }
}

/** A number after an option. @throws InputError where it is none or out of range */
export function numberOption(name: string, text: string, low: number, high: number, what: string, lowOpen = false): number {
  const value = /^\s*[-+]?(\d+\.?\d*|\.\d+)(e[-+]?\d+)?\s*$/i.test(text) ? Number(text) : Number.NaN
  if (!(value >= low && value <= high) || (lowOpen && value === low))
    throw usageError(
      `--${name}`,
      `${what} is "${text.slice(0, 40)}"`,
      `give a number ${lowOpen ? 'above' : 'from'} ${low} ${lowOpen ? 'and up to' : 'to'} ${high}`,
    )
  return value
}
