import { spawn, type ChildProcess } from 'node:child_process'
import { test as base } from '@playwright/test'
import { commandFile } from '../built-program'

/** The loopback host of the built program, as a person starts it. */
export interface Host { readonly url: string }

function address(child: ChildProcess): Promise<string> {
  return new Promise((resolve, reject) => {
    let said = ''
    const note = (chunk: Buffer) => {
      said += chunk.toString()
      const url = /http:\/\/127\.0\.0\.1:\d+\/\S+/.exec(said)?.[0]
      if (url !== undefined) resolve(url)
    }
    child.stdout?.on('data', note)
    child.stderr?.on('data', note)
    child.once('exit', (code) => { reject(new Error(`the host ended with ${code}: ${said}`)) })
  })
}

/** A host of its own for each worker; `page.goto(host.url)` opens the window. */
export const test = base.extend<object, { host: Host }>({
  host: [async ({}, use) => {
    const child = spawn(process.execPath, [commandFile, 'serve'], { stdio: ['ignore', 'pipe', 'pipe'] })
    try {
      await use({ url: await address(child) })
    } finally {
      child.kill()
    }
  }, { scope: 'worker' }],
})

export { expect } from '@playwright/test'
