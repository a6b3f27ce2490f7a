import { app } from 'electron'
import { about } from '../usecases/about'

/** Gives the program its name, which also names the folder of its data, and its About panel. Must run before anything asks for that folder. */
export function setIdentity(): void {
  app.setName(about.name)
  const caution = process.platform === 'linux' ? { copyright: about.caution } : { credits: about.caution }
  app.setAboutPanelOptions({ applicationName: about.name, applicationVersion: about.version, ...caution })
}
