import { runCommand } from '../../main/headless/run'
import { standIn } from '../usecases/stand-in'

export interface Ran { readonly code: number; readonly out: string; readonly err: string }

/** Runs a command in this process, beside a planner that does nothing. */
export async function run(args: readonly string[], input: string | Uint8Array = ''): Promise<Ran> {
  const said = { out: '', err: '' }
  const code = await runCommand(args, {
    streams: {
      readInput: () => Promise.resolve(typeof input === 'string' ? new TextEncoder().encode(input) : input),
      out: (text) => {
        said.out += typeof text === 'string' ? text : `${text.length} bytes`
        return Promise.resolve()
      },
      err: (text) => { said.err += `${text}\n` },
    },
    compute: standIn,
    environment: {},
    interrupted: new Promise(() => {}),
  })
  return { code, ...said }
}
