import type { Result } from '../contract/result'
import { saveFile } from '../documents/files'
import { hasStop } from '../usecases/run-plan'
import { exit, report } from './exit'
import type { Streams } from './streams'

/** Writes into the file that `--out` names, or to standard output; an exit code. */
export async function deliver(content: string | Uint8Array, out: unknown, streams: Streams): Promise<number> {
  if (typeof out !== 'string' || out === '-') {
    await streams.out(content)
    return exit.done
  }
  const saved = await saveFile(out, content)
  return saved.ok ? exit.done : report(saved, streams)
}

/** The exit code of a result that was delivered; its `stop` findings are said on the error stream. */
export function verdict(result: Result, streams: Streams): number {
  for (const finding of result.findings) {
    if (finding.severity === 'stop') streams.err(`stop [${finding.code}] ${finding.message}${finding.remedy === null ? '' : ` ${finding.remedy}`}`)
  }
  return hasStop(result) ? exit.unmet : exit.done
}
