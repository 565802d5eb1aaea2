import { isInputError } from '../../core/index.ts'
import { type CommandLine, readArguments } from './arguments.ts'
import { HELP_TEXT } from './help.ts'
import { Progress } from './progress.ts'

/** The batch command: reads the arguments, runs one command, turns what goes wrong into an exit code and one sentence. */

const progress = new Progress()

process.on('SIGINT', () => {
  progress.clear()
  process.stderr.write('interrupted\n')
  process.exit(130)
})
// A reader that closes early (head, less) is no fault.
process.stdout.on('error', (error: NodeJS.ErrnoException) => process.exit(error.code === 'EPIPE' ? 0 : 1))

/** Runs the command; remarks on the study go to stderr once it has succeeded. */
async function run(line: CommandLine): Promise<void> {
  switch (line.command) {
    case 'points':
      return (await import('./commands/points.ts')).points(line, progress)
    case 'horizon':
      return (await import('./commands/horizon.ts')).horizon(line, progress)
    case 'cell':
      return (await import('./commands/cell.ts')).cell(line, progress)
    case 'run':
      return (await import('./commands/run.ts')).run(line, progress)
  }
}

try {
  const line = readArguments(process.argv.slice(2))
  if (line === 'help') process.stdout.write(HELP_TEXT)
  else await run(line)
  progress.clear()
} catch (error) {
  progress.clear()
  if (isInputError(error)) {
    process.stderr.write(`${error.message}\n`)
    process.exitCode = 2
  } else {
    const what = error instanceof Error ? `${error.name}: ${error.message}` : String(error)
    process.stderr.write(`${`a fault of this program, not of your input: ${what}`.replace(/\s+/g, ' ').slice(0, 239)}\n`)
    process.exitCode = 1
  }
}
