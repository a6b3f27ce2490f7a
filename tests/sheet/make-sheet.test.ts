import { beforeAll, describe, expect, it, vi } from 'vitest'
import { cautionText } from '../../main/contract/caution'
import { resultSchema, type Result } from '../../main/contract/result'
import { formatSi } from '../../main/contract/units'
import { makeSheet, type SheetOptions } from '../../main/sheet/make-sheet'
import { margins } from '../../main/sheet/theme'
import { largeFlash, stoppedFlash, tenCycleSar, trimmedFlash } from './fixture'
import { linesOf, outside, readPdf, textOf, type ReadPage, type ReadPdf } from './read-pdf'

const options: SheetOptions = { paper: 'A4', date: new Date('2026-02-03T12:34:56Z'), version: '0.1.0', checksum: '5f1c0d7a9b32e4466b1d0a8c3f5e7790aa12bb34cc56dd78ee90ff1234567890' }
const sections = ['Title and key figures', 'What is to be built', 'Limits common to all comparators', 'The bank', 'Each comparator', 'The design', 'Error budget',
  'Power and area', 'Corners', 'Findings', 'Workings']
const fixtures = { trimmedFlash, tenCycleSar, largeFlash, stoppedFlash }
type Name = keyof typeof fixtures

const results = Object.fromEntries(Object.entries(fixtures).map(([name, make]) => [name, make()])) as Record<Name, Result>
const sheets = {} as Record<Name, ReadPdf>
const warned: unknown[][] = []

beforeAll(async () => {
  const warn = vi.spyOn(console, 'warn').mockImplementation((...said) => { warned.push(said) })
  for (const name of Object.keys(fixtures) as Name[]) sheets[name] = readPdf(await makeSheet(results[name], options))
  warn.mockRestore()
})

const each = Object.keys(fixtures) as Name[]

const strays = (page: ReadPage) => outside(page, margins[0], margins[2])

describe('every sheet', () => {
  it.each(each)('%s: is made of a result that the contract allows', (name) => {
    expect(resultSchema.safeParse(results[name]).error).toBeUndefined()
  })

  it.each(each)('%s: embeds its fonts and maps them to text', (name) => {
    const { fonts } = sheets[name]
    expect(fonts.length).toBeGreaterThanOrEqual(5)
    expect(fonts.every((font) => font.embedded && font.mapped)).toBe(true)
    for (const family of ['AtkinsonHyperlegibleNext-Regular', 'AtkinsonHyperlegibleMono-Regular', 'DejaVuSans']) expect(fonts.map((font) => font.name)).toContain(family)
  })

  it.each(each)('%s: shows no glyph that is missing', (name) => {
    const texts = sheets[name].pages.flatMap((page) => page.texts)
    expect(texts.length).toBeGreaterThan(300)
    expect(texts.filter((text) => text.missing > 0)).toEqual([])
    expect(textOf(sheets[name])).not.toMatch(/\ufffd|NaN|Infinity|undefined|null|\[object/)
  })

  it.each(each)('%s: keeps every text between the margins', (name) => {
    for (const page of sheets[name].pages) {
      expect(strays(page)).toEqual([])
      expect(page.texts.filter(({ y }) => y < 20 || y > page.height - 20)).toEqual([])
    }
  })

  it.each(each)('%s: has a bookmark for each section, in order', (name) => {
    expect(sheets[name].outline).toEqual(sections)
  })

  it.each(each)('%s: carries metadata and its language', (name) => {
    const { info, language } = sheets[name]
    expect(language).toBe('en')
    expect(info).toMatchObject({ Title: results[name].plan.title, Author: results[name].plan.author, Creator: 'Latchwright 0.1.0', CreationDate: 'D:20260203123456Z' })
  })

  it.each(each)('%s: numbers its pages and repeats title and revision', (name) => {
    const { pages } = sheets[name]
    pages.forEach((page, i) => {
      const text = linesOf(page).join('\n')
      expect(text).toContain(`page ${i + 1} of ${pages.length}`)
      expect(text).toContain(results[name].plan.title)
      if (i > 0) expect(text).toContain(`Revision ${results[name].plan.revision}`)
    })
  })

  it.each(each)('%s: gives title block and caution before any figure', (name) => {
    const first = linesOf(sheets[name].pages[0]).join(' ')
    expect(first).toContain(cautionText)
    expect(first.indexOf(cautionText)).toBeLessThan(first.indexOf('effective'))
    for (const text of ['2026-02-03 UTC', 'Latchwright 0.1.0', options.checksum]) expect(first).toContain(text)
  })

  it('draws without a word of complaint', () => {
    expect(warned).toEqual([])
  })
})

describe('what a sheet says', () => {
  it('has the totals of the result', () => {
    for (const name of ['trimmedFlash', 'tenCycleSar', 'largeFlash'] as const) {
      const { ledger, predicted } = results[name]
      const lines = sheets[name].pages.flatMap(linesOf)
      expect(lines.filter((line) => line.startsWith('Total'))).toEqual([`Total ${formatSi(ledger.power_w, 'W')}`, `Total ${formatSi(ledger.area_m2, 'm²')}`])
      expect(textOf(sheets[name])).toContain(formatSi(predicted.enob_bits, 'bit'))
    }
  })

  it('has every line of the ledger and its model, and marks what was set by hand', () => {
    const text = textOf(sheets.trimmedFlash)
    for (const { model } of results.trimmedFlash.ledger.power) expect(text).toContain(model)
    expect(text).toMatch(/Encoder ◆/)
    expect(text).toContain('from synthesis, σ of 40 µW')
    expect(text.match(/◆/g)).toHaveLength(2)
  })

  it('has every comparator of the bank once', () => {
    const places = (name: Name): string[] => {
      const start = sheets[name].pages.findIndex((page) => linesOf(page).includes('Each comparator'))
      const end = sheets[name].pages.findIndex((page) => linesOf(page).includes('The design'))
      return sheets[name].pages.slice(start, end + 1).flatMap((page) => page.texts).filter(({ size, font }) => Math.abs(size - 6.6) < 0.01 && font.includes('Mono')).map(({ text }) => text.trim())
    }
    const indices = places('largeFlash').filter((text) => /^\d+(–\d+)?$/.test(text)).map((text) => text.split('–').map(Number))
    const covered = indices.flatMap(([first, last = first]) => Array.from({ length: last - first + 1 }, (_, i) => first + i))
    expect(covered).toEqual(Array.from({ length: 1023 }, (_, i) => i + 1))
  })

  it('says reached of limit, use and the tightest of each cycle', () => {
    const text = textOf(sheets.tenCycleSar)
    expect(text).toContain('Cycle Decision, ns Noise, mV Offset, mV')
    expect(text).toContain('0.169 of 2.44')
    expect(text).toContain('9–10 0.169 of 3.40')
  })

  it('repeats the head of a table that runs over a page', () => {
    const withHead = sheets.trimmedFlash.pages.filter((page) => linesOf(page).some((line) => line.startsWith('No. Threshold, mV Decision, ps')))
    expect(withHead).toHaveLength(2)
  })

  it('stays short at 1023 comparators', () => {
    expect(sheets.largeFlash.pages.length).toBeLessThanOrEqual(14)
  })

  it('puts what stops the plan on the first page, with what would mend it', () => {
    const first = linesOf(sheets.stoppedFlash.pages[0]).join(' ')
    expect(first).toContain('This plan does not meet its limits: 2 findings to stop at')
    for (const { message, remedies } of results.stoppedFlash.findings.filter(({ severity }) => severity === 'stop')) {
      expect(first).toContain(message)
      for (const { text } of remedies) expect(first).toContain(text)
    }
    expect(first).toContain('converter.lanes = 2')
    expect(linesOf(sheets.trimmedFlash.pages[0]).join(' ')).not.toContain('does not meet')
  })

  it('shows a dash and why, where nothing was reached', () => {
    const text = textOf(sheets.stoppedFlash)
    expect(text).toContain('— of −17.0')
    expect(text).toContain('The latch could not be evaluated: see the findings.')
    expect(text).toContain('power, not reached')
  })

  it('has every finding and every working', () => {
    const { findings, workings } = results.trimmedFlash
    const text = textOf(sheets.trimmedFlash)
    for (const { message, code } of findings) expect(text).toContain(`${message}\n${code}`)
    for (const { title, formula, numbers, source } of workings) for (const part of [title, formula, numbers, source]) expect(text).toContain(part)
    expect(text.split('Least significant bit')).toHaveLength(workings.filter(({ title }) => title === 'Least significant bit').length + 1)
  })
})

describe('bytes and paper', () => {
  it('are the same for the same result and date', async () => {
    const [one, two] = [await makeSheet(trimmedFlash(), options), await makeSheet(trimmedFlash(), options)]
    expect(Buffer.from(one).equals(Buffer.from(two))).toBe(true)
  })

  it('are the same when two are made at once', async () => {
    const [one, sar, two] = await Promise.all([trimmedFlash(), tenCycleSar(), trimmedFlash()].map((result) => makeSheet(result, options)))
    expect(Buffer.from(one).equals(Buffer.from(two))).toBe(true)
    expect(textOf(readPdf(sar))).toContain(results.tenCycleSar.plan.title)
  })

  it('follow the date', async () => {
    const later = await makeSheet(tenCycleSar(), { ...options, date: new Date('2026-02-04T00:00:00Z') })
    expect(textOf(readPdf(later))).toContain('2026-02-04 UTC')
  })

  it('leave the result as it was', async () => {
    const result = trimmedFlash()
    await makeSheet(result, options)
    expect(result).toEqual(trimmedFlash())
  })

  it('fit Letter as they fit A4', async () => {
    const letter = readPdf(await makeSheet(trimmedFlash(), { ...options, paper: 'LETTER' }))
    expect([letter.pages[0].width, letter.pages[0].height]).toEqual([612, 792])
    expect([sheets.trimmedFlash.pages[0].width, sheets.trimmedFlash.pages[0].height]).toEqual([595.28, 841.89])
    expect(letter.pages.flatMap(strays)).toEqual([])
    expect(letter.outline).toEqual(sections)
  })

  it('bear titles of any kind and length', async () => {
    const result = trimmedFlash()
    const plan = { ...result.plan, title: `${'Überlanges'.repeat(19)} 漢字 🎛 ≤ λ`, author: 'Ж. Ωμέγα', revision: 'x'.repeat(40), notes: 'tab\there\u0007\nsecond line' }
    const read = readPdf(await makeSheet({ ...result, plan }, options))
    const texts = read.pages.flatMap((page) => page.texts)
    expect(texts.filter((text) => text.missing > 0)).toEqual([])
    expect(strays(read.pages[0])).toEqual([])
    expect(textOf(read)).toContain('Ж. Ωμέγα')
    expect(textOf(read)).toContain('second line')
  })
})
