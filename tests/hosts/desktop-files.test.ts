import { mkdir, mkdtemp, readFile, readdir, stat, writeFile } from 'node:fs/promises'
import { join } from 'node:path'
import { tmpdir } from 'node:os'
import { beforeEach, describe, expect, test } from 'vitest'
import { createRecent } from '../../main/electron/recent'
import { createRecovery } from '../../main/electron/recovery'
import { restartProgram, startProgram } from './desktop-program'
import type * as Fake from './electron-fake'

let program: typeof Fake
let folder: string
beforeEach(async () => {
  program = await startProgram()
  folder = await mkdtemp(join(tmpdir(), 'latchwright-files-'))
})
const ask = (name: string, request: unknown, window = program.seen.windows[0]) => program.callFrom(window, name, request)
const failed = (code: string) => ({ ok: false, error: { code } })
const choose = (path: string) => {
  program.seen.openAnswer = { canceled: false, filePaths: [path] }
  program.seen.saveAnswer = { canceled: false, filePath: path }
}
const file = async (name: string, content: string | Buffer = '{}') => {
  const path = join(folder, name)
  await writeFile(path, content)
  return path
}

describe('opening', () => {
  test('what the dialog says, and the same path again without one', async () => {
    const path = await file('a.bank.json', '{"title":"a"}')
    choose(path)
    const opened = { ok: true, value: { text: '{"title":"a"}', path, name: 'a.bank.json' } }
    expect(await ask('files.open', { path: null })).toEqual(opened)
    program.seen.openAnswer = { canceled: true, filePaths: [] }
    expect(await ask('files.open', { path })).toEqual(opened)
    expect(program.seen.windows[0].state.file).toBe(path)
  })

  test('nothing when the dialog is cancelled', async () => {
    expect(await ask('files.open', { path: null })).toEqual({ ok: true, value: null })
  })

  test('no path that the page made up', async () => {
    const path = await file('secret.json')
    expect(await ask('files.open', { path })).toMatchObject(failed('refused'))
    choose(await file('other.json'))
    await ask('files.open', { path: null })
    expect(await ask('files.open', { path })).toMatchObject(failed('refused'))
    expect(await ask('files.open', { path: join(folder, '.', 'x', '..', 'other.json') })).toMatchObject({ ok: true })
    expect(await ask('files.open', { path: `${folder}/./other.json` })).toMatchObject(failed('refused'))
  })

  test('no path that only another window knows', async () => {
    const path = await file('a.bank.json')
    choose(path)
    await ask('files.open', { path: null })
    program.app.emit('open-file', { preventDefault: () => undefined }, join(folder, 'b.bank.json'))
    expect(await ask('files.open', { path }, program.seen.windows[1])).toMatchObject(failed('refused'))
  })

  test('a recent path, once this window was told of it; to read, not to write', async () => {
    const path = await file('recent.bank.json')
    choose(path)
    await ask('files.open', { path: null })
    program = await restartProgram(program)
    expect(await ask('files.open', { path })).toMatchObject(failed('refused'))
    const recent = await ask('files.recent', {}) as { value: { paths: string[] } }
    expect(recent.value.paths[0]).toBe(path)
    expect(await ask('files.save', { text: 'x', path, suggested_name: 'x' })).toMatchObject(failed('refused'))
    expect(await ask('files.open', { path })).toMatchObject({ ok: true })
    expect(await ask('files.save', { text: 'x', path, suggested_name: 'x' })).toMatchObject({ ok: true })
    expect(await readFile(path, 'utf8')).toBe('x')
  })

  test.each([
    ['gone', 'not_found'], ['folder', 'read_failed'], ['large.json', 'bad_document'], ['binary.json', 'bad_document'], ['latin.json', 'bad_document'],
  ])('says what is wrong with %s', async (name, code) => {
    await mkdir(join(folder, 'folder'))
    await file('large.json', ' '.repeat(5_000_001))
    await file('binary.json', Buffer.from([0, 1, 2]))
    await file('latin.json', Buffer.from([0x22, 0xe9, 0x22]))
    choose(join(folder, name))
    expect(await ask('files.open', { path: null })).toMatchObject(failed(code))
  })

  test('keeps a byte order mark, so that reading can tell of it', async () => {
    choose(await file('bom.json', '\uFEFF{}'))
    expect(await ask('files.open', { path: null })).toMatchObject({ value: { text: '\uFEFF{}' } })
  })
})

describe('saving', () => {
  test('asks where, then writes there again without asking', async () => {
    const path = join(folder, 'new.bank.json')
    choose(path)
    expect(await ask('files.save', { text: 'one', path: null, suggested_name: 'My plan.bank.json' })).toEqual({ ok: true, value: { path, name: 'new.bank.json' } })
    expect(program.seen.saveOptions[0].defaultPath).toMatch(/My plan\.bank\.json$/)
    expect(await ask('files.save', { text: 'two', path, suggested_name: 'x' })).toMatchObject({ ok: true })
    expect(program.seen.saveOptions).toHaveLength(1)
    expect(await readFile(path, 'utf8')).toBe('two')
    expect(await readdir(folder)).toEqual(['new.bank.json'])
  })

  test('nothing when the dialog is cancelled, nowhere else by itself', async () => {
    expect(await ask('files.save', { text: 'x', path: null, suggested_name: 'x' })).toEqual({ ok: true, value: null })
    expect(await ask('files.save', { text: 'x', path: join(folder, 'y'), suggested_name: 'x' })).toMatchObject(failed('refused'))
    expect(await readdir(folder)).toEqual([])
  })

  test.each([['../../etc/passwd', /passwd$/], ['..\\..\\x.json', /x\.json$/], ['', /plan\.bank\.json$/], ['...', /plan\.bank\.json$/]])('suggests a bare name for %j', async (suggested_name, name) => {
    await ask('files.save', { text: 'x', path: null, suggested_name })
    expect(program.seen.saveOptions[0].defaultPath).toMatch(name)
    expect(program.seen.saveOptions[0].defaultPath).not.toContain('..')
  })

  test('says so when it cannot', async () => {
    choose(join(folder, 'no', 'such', 'folder.json'))
    expect(await ask('files.save', { text: 'x', path: null, suggested_name: 'x' })).toMatchObject(failed('write_failed'))
  })

  test('exports bytes as they are', async () => {
    const path = join(folder, 'sheet.pdf')
    choose(path)
    const bytes = Buffer.from([0x25, 0x50, 0x44, 0x46, 0, 255])
    expect(await ask('files.export', { base64: bytes.toString('base64'), suggested_name: 'sheet.pdf' })).toEqual({ ok: true, value: { name: 'sheet.pdf' } })
    expect(await readFile(path)).toEqual(bytes)
    expect(await ask('files.export', { base64: 'AAAA', suggested_name: 'fdp.desktop' })).toMatchObject(failed('bad_request'))
    expect(await ask('files.export', { base64: 'AAAA', suggested_name: 'a\u202etxt.pdf' })).toMatchObject({ ok: true })
    expect(program.seen.saveOptions.at(-1)?.defaultPath).toMatch(/\/atxt\.pdf$/)
    await writeFile(path, bytes)
    expect(await ask('files.export', { base64: 'not base64!', suggested_name: 'x' })).toMatchObject(failed('bad_request'))
    expect(await ask('files.save', { text: 'x', path, suggested_name: 'x' })).toMatchObject(failed('refused'))
  })
})

describe('recent files', () => {
  test('are the newest ten, each once, over restarts', async () => {
    const recent = createRecent(folder)
    await Promise.all(Array.from({ length: 12 }, (_, index) => recent.add(`/p/${index}`)))
    await recent.add('/p/5')
    expect((await stat(join(folder, 'recent.json'))).mode & 0o777).toBe(0o600)
    const paths = await createRecent(folder).list()
    expect(paths).toEqual(['/p/5', '/p/11', '/p/10', '/p/9', '/p/8', '/p/7', '/p/6', '/p/4', '/p/3', '/p/2'])
  })
  test.each(['', '{', '[]', '{"paths":[1]}'])('are none when the list is broken: %j', async (content) => {
    await file('recent.json', content)
    expect(await createRecent(folder).list()).toEqual([])
  })
})

describe('recovery', () => {
  const all = () => false
  test('brings back what a program that is gone left, the newest first, each once', async () => {
    const gone = createRecovery(folder, 11, all)
    await gone.keep(1, 'older')
    await new Promise((resolve) => setTimeout(resolve, 20))
    await gone.keep(2, 'newer')
    const next = createRecovery(folder, 22, all)
    expect([await next.read(1), await next.read(2), await next.read(3)]).toEqual(['newer', 'older', null])
    expect(await next.read(1)).toBe('newer')
  })
  test('leaves the work of a running program alone', async () => {
    await createRecovery(folder, 11, all).keep(1, 'theirs')
    expect(await createRecovery(folder, 22, (pid) => pid === 11).read(1)).toBeNull()
  })
  test('keeps the last of many, and nothing after null', async () => {
    const recovery = createRecovery(folder, 11, all)
    await Promise.all(['a', 'b', 'c'].map((text) => recovery.keep(1, text)))
    expect(await recovery.read(1)).toBe('c')
    await recovery.keep(1, null)
    expect(await recovery.read(1)).toBeNull()
    expect(await readdir(join(folder, 'recovery'))).toEqual([])
    expect((await stat(join(folder, 'recovery'))).mode & 0o777).toBe(0o700)
  })
})
