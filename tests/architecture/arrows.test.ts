import ts from 'typescript'
import { expect, test } from 'vitest'
import { importFault, partOf } from './arrows.mjs'
import { isCode, projectFiles, textOf } from './sources'

function importsOf(file: string): string[] {
  return ts.preProcessFile(textOf(file), true, true).importedFiles.map((found) => found.fileName)
}

const files = projectFiles().filter(isCode)

test('imports follow the arrows: app to contract; hosts to use cases to documents, trials, sheet, exports, planner to contract', () => {
  const faults = files.flatMap((file) => importsOf(file).flatMap((specifier) => {
    const fault = importFault(file, specifier)
    return fault === null ? [] : [`${file}: ${fault}`]
  }))
  expect(faults).toEqual([])
})

test.each([
  ['app/main.tsx', '../main/planner/plan'], ['app/main.tsx', 'node:fs'], ['app/main.tsx', 'fs'], ['main/planner/plan.ts', '../documents/cards'],
  ['main/planner/plan.ts', 'node:fs'], ['main/planner/plan.ts', 'zod'], ['main/contract/plan.ts', '../planner/plan'], ['main/contract/plan.ts', 'react'],
  ['main/sheet/make-sheet.ts', '../planner/plan'], ['main/headless/plan.ts', '../planner/plan'], ['main/loopback.ts', './sheet/make-sheet'],
  ['main/usecases/run-plan.ts', '../electron/menu'], ['main/documents/cards.ts', '../usecases/about'], ['main/usecases/about.ts', 'electron'],
  ['tests/independent/run.ts', '../../main/planner/plan'],
])('%s may not import %s', (file, specifier) => {
  expect(importFault(file, specifier)).not.toBeNull()
})

test.each([
  ['app/main.tsx', '../main/contract/plan'], ['app/main.tsx', './state/store'], ['app/main.tsx', './styles/base.css'], ['main/planner/plan.ts', './stages/brief'],
  ['main/usecases/run-plan.ts', '../planner/plan'], ['main/headless.ts', './headless/run'], ['main/usecases/about.ts', '../../package.json'],
  ['main/documents/cards.ts', '../../assets/cards/generic.json'], ['main/electron/menu.ts', 'electron'],
])('%s may import %s', (file, specifier) => {
  expect(importFault(file, specifier)).toBeNull()
})

test('every file of the program belongs to a part', () => {
  expect(files.filter((file) => (file.startsWith('main/') || file.startsWith('app/')) && partOf(file) === null)).toEqual([])
})
