import ts from 'typescript'
import { describe, expect, test } from 'vitest'
import { isCode, projectFiles, textOf, topNames } from './sources'

const allowedAtTop = [
  'package.json', 'package-lock.json', 'tsconfig.json', 'electron.config.ts', 'README.md', 'DEVELOPERS.md', 'LICENSE', 'app', 'main', 'tests', 'assets', '.ci',
  '.gitignore',
]
const code = projectFiles().filter(isCode)
const program = code.filter((file) => !file.startsWith('tests/'))
const linesOf = (file: string) => textOf(file).trimEnd().split('\n').length
const share = (sorted: readonly number[], part: number) => sorted[Math.min(sorted.length - 1, Math.floor(sorted.length * part))]

/** Lengths of all functions of a file, in lines, inner ones counted by themselves too. */
function functionLengths(file: string): { where: string; lines: number }[] {
  const source = ts.createSourceFile(file, textOf(file), ts.ScriptTarget.Latest, true)
  const found: { where: string; lines: number }[] = []
  const visit = (node: ts.Node): void => {
    if (ts.isFunctionLike(node) && 'body' in node && node.body) {
      const first = source.getLineAndCharacterOfPosition(node.getStart()).line
      found.push({ where: `${file}:${first + 1}`, lines: source.getLineAndCharacterOfPosition(node.end).line - first + 1 })
    }
    ts.forEachChild(node, visit)
  }
  visit(source)
  return found
}

test('nothing at the top but what belongs there', () => {
  expect(topNames.filter((name) => !allowedAtTop.includes(name))).toEqual([])
})

test('.ci holds run and nothing else', () => {
  expect(projectFiles().filter((file) => file.startsWith('.ci/'))).toEqual(['.ci/run'])
})

describe('files and functions stay small', () => {
  test('no file of code above 400 lines', () => {
    expect(code.filter((file) => linesOf(file) > 400)).toEqual([])
  })

  test('half of the program’s files under 120 lines, nine of ten under 250', () => {
    const sorted = program.map(linesOf).sort((a, b) => a - b)
    expect(share(sorted, 0.5)).toBeLessThan(120)
    expect(share(sorted, 0.9)).toBeLessThan(250)
  })

  test('nine of ten functions under 35 lines', () => {
    const named = program.flatMap(functionLengths).filter(({ lines }) => lines > 1)
    expect(named.length).toBeGreaterThan(100)
    const long = named.filter(({ lines }) => lines >= 35)
    expect(long.length / named.length, long.map(({ where, lines }) => `${where} ${lines}`).join('\n')).toBeLessThan(0.1)
  })
})
