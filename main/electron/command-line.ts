import { resolve } from 'node:path'

export interface CommandLine {
  /** Arguments of a command, such as `plan FILE`; null: the window is wanted. */
  readonly command: readonly string[] | null
  /** Plan files to open, absolute. */
  readonly files: readonly string[]
}

/**
 * Tells a command from plan files.
 *
 * @param argv      arguments as the process got them
 * @param packaged  whether the program is its own executable; else the first plain argument is the folder it is started from
 * @param commands  names of the commands
 * @param folder    folder that plan files are relative to
 */
export function readCommandLine(argv: readonly string[], packaged: boolean, commands: readonly string[], folder: string): CommandLine {
  const given = packaged ? argv.slice(1) : afterProgram(argv.slice(1))
  const first = given.findIndex((argument) => !isSwitch(argument))
  const own = first < 0 ? [] : given.slice(first)
  if (own.length > 0 && (commands.includes(own[0]) || isQuestion(own[0]))) return { command: own, files: [] }
  return { command: null, files: own.filter((argument) => !argument.startsWith('-')).map((path) => resolve(folder, path)) }
}

const afterProgram = (given: readonly string[]) => given.slice(given.findIndex((argument) => !argument.startsWith('-')) + 1)
const isQuestion = (argument: string) => argument === '--help' || argument === '--version'
const isSwitch = (argument: string) => argument.startsWith('-') && !isQuestion(argument)
