import { app } from 'electron'

/** Runs a command of the command line inside the desktop program, without a window, and ends with its exit code. */
export async function runCommand(args: readonly string[]): Promise<void> {
  app.disableHardwareAcceleration()
  const { runProcess } = await import('../headless/run')
  app.exit(await runProcess(args))
}
