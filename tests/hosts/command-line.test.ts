import { expect, test } from 'vitest'
import { readCommandLine } from '../../main/electron/command-line'

const read = (argv: string[], packaged: boolean) => readCommandLine(argv, packaged, ['plan', 'serve'], '/home/me')

test.each([
  [['electron', '.'], false, null, []],
  [['electron', '--no-sandbox', '.', 'a.json', '/b.json'], false, null, ['/home/me/a.json', '/b.json']],
  [['electron', '.', 'plan', 'a.json', '--out', 'r.json'], false, ['plan', 'a.json', '--out', 'r.json'], []],
  [['electron', '--inspect=0', 'out/main/electron.js'], false, null, []],
  [['latchwright'], true, null, []],
  [['latchwright', 'plan', 'a.json'], true, ['plan', 'a.json'], []],
  [['latchwright', '--no-sandbox', 'plan', 'a.json'], true, ['plan', 'a.json'], []],
  [['latchwright', '--help'], true, ['--help'], []],
  [['latchwright', 'plan.bank.json'], true, null, ['/home/me/plan.bank.json']],
  [['latchwright', 'a.json', '--enable-logging'], true, null, ['/home/me/a.json']],
])('%j packaged %j', (argv, packaged, command, files) => {
  expect(read(argv, packaged)).toEqual({ command, files })
})
