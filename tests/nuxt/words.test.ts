import { describe, expect, it } from 'vitest'
import { fullDate, isoWeek, shortDate } from '~/composables/civilDate'
import { plainNumber } from '~/composables/plainNumber'
import { cellarSentence, contentWords, figureSentence } from '~/composables/vesselWords'
import { aVessel } from './aVessel'

describe('words of the cellar', () => {
  it('tells an empty cellar by its room', () => {
    expect(cellarSentence([aVessel(), aVessel({ workingLitres: 225.5 })])).toBe('Two vessels stand here, 4,225.5 litres of room; all are empty.')
    expect(cellarSentence([aVessel()])).toBe('One vessel stands here, 4,000 litres of room; it is empty.')
  })

  it('tells a filled one by its litres and their mean age, weighed by litres', () => {
    const vessels = [aVessel({ litres: 3000, meanAgeDays: 730.5 }), aVessel({ litres: 1000, meanAgeDays: 1461 }), aVessel()]
    expect(cellarSentence(vessels)).toBe('4,000 litres in three vessels, 2.50 years old on average. One is empty.')
  })

  it('counts in figures from twenty-one on', () => {
    expect(cellarSentence(Array.from({ length: 21 }, () => aVessel()))).toMatch(/^21 vessels stand here, 84,000 litres/)
  })

  it('says what is in one vessel', () => {
    expect(contentWords({ litres: 0, meanAgeDays: null })).toBe('empty')
    expect(contentWords({ litres: 4000, meanAgeDays: 788 })).toBe('4,000\u00A0L, 2.16\u00A0y')
    expect(figureSentence(aVessel())).toBe('Heron: vat of wood, room for 4,000\u00A0L, empty.')
    expect(figureSentence(aVessel({ kind: 'glassCarboy', wood: false, workingLitres: 20, litres: 5 }))).toBe('Heron: glass carboy of glass, room for 20\u00A0L, holding 5\u00A0L.')
  })
})

describe('days', () => {
  it('are written in full and in short', () => {
    expect(fullDate('2026-09-14')).toBe('Mon 14 September 2026')
    expect(shortDate('2026-09-14')).toBe('Mon 14 Sep')
  })

  it.each([['2026-09-14', 38], ['2026-01-01', 1], ['2027-01-01', 53], ['2024-12-30', 1], ['2021-01-03', 53], ['2026-12-31', 53]] as const)('%s lies in week %i', (day, week) => {
    expect(isoWeek(day)).toBe(week)
  })
})

describe('a field of figures', () => {
  it.each([['1.5', 1.5], ['1,5', 1.5], [' 225 ', 225], ['1\u202F200', 1200], ['0,25', 0.25], ['-3', -3]] as const)('reads %j as a number', (typed, number) => {
    expect(plainNumber(typed)).toBe(number)
  })

  it.each(['', 'many', '1 200', '4,000', '1,500,5', '1.', '.5', '1e3', '0x10', 'Infinity', '12 L'])('leaves %j for the server to speak of', (typed) => {
    expect(plainNumber(typed)).toBe(typed)
  })
})
