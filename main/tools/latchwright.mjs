#!/usr/bin/env node
import { existsSync } from 'node:fs'
import { fileURLToPath, pathToFileURL } from 'node:url'

const entry = fileURLToPath(new URL('../../out/main/headless.js', import.meta.url))

/** A build that is just being renamed into place is there a moment later. */
async function isBuilt() {
  for (let attempt = 0; attempt < 10 && !existsSync(entry); attempt += 1) await new Promise((resolve) => setTimeout(resolve, 30))
  return existsSync(entry)
}

if (await isBuilt()) await import(pathToFileURL(entry).href)
else {
  console.error('latchwright: the program is not built yet. In its folder run: npm ci')
  process.exitCode = 3
}
