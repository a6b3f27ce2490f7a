import { execFile } from 'node:child_process'
import { promisify } from 'node:util'
import type { Taken } from './measure'

const run = promisify(execFile)

/** Runs a part of the bench in fresh processes, one after the other, each of which times itself. */
export async function inFreshProcesses(part: string, argument: string, runs: number): Promise<Taken[]> {
  const all: Taken[] = []
  for (let i = 0; i < runs; i += 1) {
    const { stdout } = await run(process.execPath, [process.argv[1], part, argument])
    all.push(JSON.parse(stdout) as Taken)
  }
  return all
}
