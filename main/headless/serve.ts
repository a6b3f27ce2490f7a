import { wholeNumber, type Face } from './command'
import { exit } from './exit'

/** `serve`: the window in a browser of this machine, until interrupted. */
export const serveCommand: Face = {
  declare: (command) => command
    .description('serve the window to a browser of this machine (127.0.0.1 only), until Ctrl-C')
    .argument('[FILE]', 'plan file to start with')
    .option('--port <N>', 'port; any free one when left out', wholeNumber(0, 65_535), 0)
    .option('--open', 'open it in an installed browser as well'),
  run: async ([planFile], options, { streams, interrupted }) => {
    const { startLoopback } = await import('../loopback')
    try {
      const host = await startLoopback({
        port: options['port'] as number, open: options['open'] === true, ...(planFile !== undefined && { planFile }),
      })
      await streams.out(`${host.url}\n`)
      streams.err('latchwright: open this address in a browser of this machine. Ctrl-C ends.')
      await interrupted
      await host.close()
      return exit.cancelled
    } catch (error) {
      streams.err(`latchwright: ${error instanceof Error ? error.message : String(error)}`)
      return exit.cannotReadOrWrite
    }
  },
}
