import { readDocumentStream } from '../documents/files'

/** Where a command reads and writes: the process's own streams, or a test's. */
export interface Streams {
  readonly readInput: () => Promise<Uint8Array>
  readonly out: (text: string | Uint8Array) => Promise<void>
  readonly err: (text: string) => void
}

function write(stream: NodeJS.WriteStream, text: string | Uint8Array): Promise<void> {
  return new Promise((resolve, reject) => {
    stream.write(text, (error) => {
      if (error && !isBrokenPipe(error)) reject(error)
      else resolve()
    })
  })
}

/** The reader of our output has had enough; that is no fault. */
export function isBrokenPipe(error: unknown): boolean {
  return error instanceof Error && 'code' in error && (error.code === 'EPIPE' || error.code === 'ERR_STREAM_DESTROYED')
}

/** What a terminal would obey or reorder a line by: control characters but line breaks, and the marks of direction. */
const unseen = /(?!\n)[\p{Cc}\p{Bidi_Control}\u2028\u2029]/gu

/** Text that only says something: what a document brings along cannot steer the terminal it is shown on. */
export const harmless = (text: string): string => text.replace(unseen, (sign) => `\\u${sign.charCodeAt(0).toString(16).padStart(4, '0')}`)

export function processStreams(): Streams {
  for (const stream of [process.stdout, process.stderr]) {
    stream.on('error', (error) => {
      if (!isBrokenPipe(error)) throw error
    })
  }
  return {
    readInput: () => readDocumentStream(process.stdin as AsyncIterable<Uint8Array>),
    out: (text) => write(process.stdout, text),
    err: (text) => { process.stderr.write(`${harmless(text)}\n`) },
  }
}
