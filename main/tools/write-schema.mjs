/* Writes assets/plan.schema.json from the definition that checks plans; with --check it only says whether the file is up to date. */
import { readFileSync, writeFileSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import { runnerImport } from 'vite'

const file = fileURLToPath(new URL('../../assets/plan.schema.json', import.meta.url))
const { module } = await runnerImport(fileURLToPath(new URL('../documents/plan-schema.ts', import.meta.url)))
const text = `${JSON.stringify(module.planJsonSchema, null, 2)}\n`

if (!process.argv.includes('--check')) writeFileSync(file, text)
else if (readFileSync(file, 'utf8') !== text) {
  console.error('assets/plan.schema.json is out of date. Run: node main/tools/write-schema.mjs')
  process.exitCode = 1
}
