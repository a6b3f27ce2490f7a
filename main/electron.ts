import { app } from 'electron'
import { commandNames } from './headless/names'
import { readCommandLine } from './electron/command-line'
import { startDesktop } from './electron/desktop'
import { setIdentity } from './electron/identity'
import { followLife } from './electron/life'
import { lockDownPages, lockDownSession } from './electron/lock-down'
import { runCommand } from './electron/run-command'
import { registerWindowScheme, serveWindowFiles } from './electron/window-files'

const line = readCommandLine(process.argv, app.isPackaged, commandNames, process.cwd())

if (line.command !== null) void runCommand(line.command)
else {
  setIdentity()
  registerWindowScheme()
  lockDownPages()
  const openFirst = followLife(line.files)
  void app.whenReady().then(() => {
    lockDownSession()
    serveWindowFiles()
    openFirst(startDesktop())
  })
}
