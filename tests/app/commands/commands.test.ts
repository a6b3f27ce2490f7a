import { readdirSync, readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { allCommands, shortcutCommands } from '../../../app/commands/index'

const folder = new URL('../../../app/commands/', import.meta.url)
const helpers = ['index.ts', 'command.ts', 'shortcuts.ts', 'guard.ts']
const files = readdirSync(folder).filter((name) => name.endsWith('.ts') && !helpers.includes(name))

describe('the commands', () => {
  it.each(files)('%s states one command by the name of its file, and is listed', (file) => {
    const text = readFileSync(new URL(file, folder), 'utf8')
    const ids = [...text.matchAll(/\bid: '([a-z-]+)'/g)].map(([, id]) => id)
    expect(ids.length).toBeGreaterThan(0)
    if (ids.length === 1) expect(ids[0]).toBe(file.replace('.ts', ''))
    for (const id of ids) expect(allCommands.map((one) => one.id), `${id} is missing in index.ts`).toContain(id)
  })

  it('has labels, and ids and shortcuts of one meaning each', () => {
    expect(new Set(allCommands.map(({ id }) => id)).size).toBe(allCommands.length)
    const keys = allCommands.flatMap(({ shortcut }) => (shortcut ? [JSON.stringify(shortcut)] : []))
    expect(new Set(keys).size).toBe(keys.length)
    for (const { label } of allCommands) expect(label).toMatch(/^[A-Z]/)
  })

  it('lists every command that has keys among those that listen for them', () => {
    expect(shortcutCommands.map(({ id }) => id)).toEqual(allCommands.filter(({ shortcut }) => shortcut !== null).map(({ id }) => id))
  })
})
