import { Command, CommanderError } from 'commander'
import { about } from '../usecases/about'
import { poolCompute, type ComputePool } from '../usecases/compute-pool'
import type { Face, Surroundings } from './command'
import { exit } from './exit'
import { faceNames, type FaceName } from './names'
import { planCommand } from './plan'
import { serveCommand } from './serve'
import { sheetCommand } from './sheet'
import { processStreams } from './streams'
import { wavesCommand } from './waves'

const faces: Readonly<Record<FaceName, Face>> = { plan: planCommand, sheet: sheetCommand, waves: wavesCommand, serve: serveCommand }

/** What commander would print: help goes to standard output, complaints and their hints to the error stream. */
interface Said { out: string; err: string }

function quiet(command: Command, said: Said): Command {
  const called = command.name() === 'latchwright' ? 'latchwright' : `latchwright ${command.name()}`
  return command.exitOverride().showSuggestionAfterError(true).showHelpAfterError(`(more with: ${called} --help)`).configureOutput({
    writeOut: (text) => { said.out += text },
    writeErr: (text) => { said.err += text },
    getOutHasColors: () => false,
    getErrHasColors: () => false,
  })
}

function programOf(surroundings: Surroundings, said: Said, finish: (code: number) => void): Command {
  const program = quiet(new Command('latchwright'), said)
    .description('Plans the clocked comparators of a data converter.').version(about.version, '--version')
    .addHelpText('after', `\n${about.caution}\n\nExit codes: 0 done and all limits met, 1 done but a limit is not met, 2 bad input or usage, 3 could not read or write, 130 cancelled.`)
  for (const name of faceNames) {
    const face = faces[name]
    const command = quiet(program.command(name), said).version(about.version, '--version')
    face.declare(command).action(async () => {
      finish(await face.run(command.args, command.opts(), surroundings))
    })
  }
  return program
}

/**
 * Runs a command.
 *
 * @param args  arguments after the program's name
 * @returns     the exit code
 */
export async function runCommand(args: readonly string[], surroundings: Surroundings): Promise<number> {
  const said = { out: '', err: '' }
  let code: number = exit.done
  try {
    await programOf(surroundings, said, (finished) => { code = finished }).parseAsync(args, { from: 'user' })
  } catch (error) {
    if (!(error instanceof CommanderError)) throw error
    code = error.exitCode === 0 ? exit.done : exit.badInput
  }
  if (said.out !== '') await surroundings.streams.out(said.out)
  if (said.err !== '') surroundings.streams.err(said.err.trimEnd())
  return code
}

function interruption(): Promise<void> {
  return new Promise((resolve) => {
    process.once('SIGINT', () => resolve())
    process.once('SIGTERM', () => resolve())
  })
}

/** Runs a command of this process, to its end or to an interruption. Plans run beside, so that an interruption is heard at once. */
export async function runProcess(args: readonly string[]): Promise<number> {
  const streams = processStreams()
  const interrupted = interruption()
  let pool: ComputePool | null = null
  const compute = () => pool ??= poolCompute({ threads: 1 })
  const running = runCommand(args, { streams, compute, environment: process.env, interrupted })
  const serving = args[0] === ('serve' satisfies FaceName)
  try {
    return serving ? await running : await Promise.race([running, interrupted.then(() => exit.cancelled)])
  } catch (error) {
    streams.err(`latchwright: ${error instanceof Error ? error.message : String(error)}`)
    return exit.cannotReadOrWrite
  } finally {
    await (pool as ComputePool | null)?.close()
  }
}
