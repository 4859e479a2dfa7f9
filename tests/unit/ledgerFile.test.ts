import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { CellFault, dateOf, litresOf, lossOf, numberOf, wordOf } from '../../server/ledgerFile/cells'
import { fromInert, inert } from '../../server/ledgerFile/inert'
import { readLedgerFile } from '../../server/ledgerFile/read'
import { writeLedgerFile } from '../../server/ledgerFile/write'

describe('a number in a cell', () => {
  it.each([['12', 12], ['12.5', 12.5], ['12,5', 12.5], ['0,125', 0.125], ['1 200', 1200], ['1 200,5', 1200.5], ['1\u202F200', 1200], ['-3', -3], ['12,25', 12.25], ['1000.125', 1000.125]])('%s is read', (text, value) => {
    expect(numberOf(text)).toBe(value)
  })

  it.each(['1,000', '12,345', 'NaN', '1e3', 'Infinity', '', '12 L', '1.000,5', '1,2,3', '.5', '--1', '٣'])('%s is asked back', (text) => {
    expect(() => numberOf(text)).toThrow(CellFault)
  })

  it('litres are above nought, a loss on the way may be nought, neither has four decimals', () => {
    expect([litresOf('0.001'), lossOf('0')]).toEqual([0.001, 0])
    for (const text of ['0', '-1', '0.0001', '1000000000']) expect(() => litresOf(text), text).toThrow(CellFault)
    expect(() => lossOf('-0.5')).toThrow(CellFault)
  })
})

it('a day is one of the calendar', () => {
  expect(dateOf('2024-02-29')).toBe('2024-02-29')
  for (const text of ['2026-02-29', '2026-02-31', '29.2.2024', '2026-9-1', '2026-09-14T00:00:00Z']) expect(() => dateOf(text), text).toThrow(CellFault)
})

it('a word is taken in any case, and told what it might have been', () => {
  expect(wordOf('Evaporation', ['evaporation', 'leak'])).toBe('evaporation')
  expect(() => wordOf('gone', ['evaporation', 'leak'])).toThrow('gone is none of: evaporation, leak.')
})

describe('text that a spreadsheet would run', () => {
  it.each(['=1+1', '+1', '-1', '@x', '\tx', '\rx', '＝x', '\'=1', '\'\'=1', '=cmd|\' /C calc\'!A0'])('%j is made inert, and comes back as it was', (text) => {
    expect(inert(text)).toBe(`'${text}`)
    expect(fromInert(inert(text))).toBe(text)
  })

  it('any text comes back as it was, and other text is not touched', () => {
    fc.assert(fc.property(fc.string(), text => fromInert(inert(text)) === text))
    for (const text of ['', 'Heron', '\'tis', '1-2', 'a=b']) expect(inert(text)).toBe(text)
  })
})

it('any line that is written out is read back the same', async () => {
  const note = fc.string({ minLength: 1, maxLength: 60 }).map(text => text.replace(/\p{Cc}/gu, ' ').trim()).filter(text => text !== '' && text.isWellFormed())
  await fc.assert(fc.asyncProperty(fc.array(fc.record({ litres: fc.integer({ min: 1, max: 9_999_999 }).map(n => n / 1000), note, vessel: note }), { minLength: 1, maxLength: 8 }), async (lines) => {
    const file = await readLedgerFile(writeLedgerFile(lines.map(line => ({ date: '2026-03-02', act: 'draw', ...line }))))
    expect(file.faults).toEqual([])
    expect(file.lines.map(line => line.act === 'draw' && { litres: line.litres, note: line.note, vessel: line.vessel })).toEqual(lines)
  }), { numRuns: 60 })
})
