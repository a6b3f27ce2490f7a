import { runProcess } from './headless/run'

const code = await runProcess(process.argv.slice(2))
if (code === 130) process.exit(code)
process.exitCode = code
