import { ensureBuilt } from '../built-program'
import { prepareBrowser } from './browser'

export default async function globalSetup(): Promise<void> {
  await ensureBuilt()
  await prepareBrowser()
}
