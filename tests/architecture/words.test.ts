import { describe, expect, test } from 'vitest'
import { isCode, projectFiles, textOf } from './sources'

/** Words are put together here so that this file does not contain them. */
const join = (...parts: string[]): string => parts.join('')
const unwanted = [
  new RegExp(join('sub', '-?agent'), 'i'), new RegExp(join('trans', 'cript'), 'i'), new RegExp(join('cla', 'ude'), 'i'), new RegExp(join('anth', 'ropic'), 'i'),
  new RegExp(join('/wo', 'rk/')), new RegExp(join('/ro', 'ot/')),
  new RegExp(join('TO', 'DO')), new RegExp(join('FIX', 'ME')), new RegExp(join('X', 'XX')),
]
const cited = new RegExp(join('lec', 'ture'), 'i')
const onlyPublicRegistry = new RegExp(join('"resolved": "https?://(?!registry\\.npm', 'js\\.org/)'))

const files = projectFiles()
const readable = files.filter((file) => /\.(ts|tsx|mjs|mts|json|md|css|html|svg|txt)$|\/run$|^LICENSE$|^\.gitignore$/.test(file))
const prose = readable.filter((file) => file !== 'package-lock.json')

const linesWith = (file: string, pattern: RegExp) => textOf(file).split('\n').flatMap((line, index) => (pattern.test(line) ? [`${file}:${index + 1}`] : []))

describe('words', () => {
  test('no paths of a machine, nothing about how it was made, nothing left open', () => {
    expect(prose.flatMap((file) => unwanted.flatMap((pattern) => linesWith(file, pattern)))).toEqual([])
  })

  test('a course is cited only beside the values taken from it', () => {
    expect(prose.filter((file) => !file.startsWith('tests/published/')).flatMap((file) => linesWith(file, cited))).toEqual([])
  })

  test('the lock file names the public registry or none', () => {
    expect(linesWith('package-lock.json', onlyPublicRegistry)).toEqual([])
  })
})

describe('tests', () => {
  const tests = files.filter((file) => /\.(test|spec)\.tsx?$/.test(file))
  const silenced = new RegExp(join('\\b(test|it|describe)(\\.\\w+)*\\.(only|to', 'do|fails|fixme)\\b|\\bx(it|describe)\\('))
  const skippedByName = new RegExp(join('\\.sk', 'ip\\(\\s*[\'"`]'))
  const cannotFail = /expect\((true|false|1|0|null)\)|toBeDefined\(\)\s*$/

  test('none is silenced, none cannot fail', () => {
    expect(tests.flatMap((file) => [silenced, skippedByName, cannotFail].flatMap((pattern) => linesWith(file, pattern)))).toEqual([])
  })

  test('every test file expects something', () => {
    const expects = /\bexpect(\w*)\(|fc\.assert\(|assert\w*\(/
    expect(tests.filter((file) => !expects.test(textOf(file)))).toEqual([])
  })

  test('no rule of the linter is switched off for a whole file', () => {
    expect(files.filter(isCode).flatMap((file) => linesWith(file, /eslint-disable(?!-(next-)?line)|@ts-(nocheck|ignore)/))).toEqual(
      [expect.stringContaining('tests/architecture/words.test.ts')],
    )
  })
})
