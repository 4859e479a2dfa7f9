import fc from 'fast-check'
import { expect, it } from 'vitest'
import { addDays, civilDateIn, civilDateOf, daysBetween, epochDay, mondayOf } from '../../shared/cellar/civilDate'
import { moveSpokenDays, weeksBetween } from '../../dev/loadDemo'

it('knows what day it is where the brewery is, on both sides of midnight and of the clock change', () => {
  expect(civilDateIn('Europe/Copenhagen', Date.parse('2026-09-13T21:59:59Z'))).toBe('2026-09-13')
  expect(civilDateIn('Europe/Copenhagen', Date.parse('2026-09-13T22:00:00Z'))).toBe('2026-09-14')
  expect(civilDateIn('Europe/Copenhagen', Date.parse('2026-10-25T22:59:59Z'))).toBe('2026-10-25')
  expect(civilDateIn('Pacific/Kiritimati', Date.parse('2026-12-31T10:00:00Z'))).toBe('2027-01-01')
})

const day = fc.integer({ min: 0, max: 60_000 }).map(n => addDays('1970-01-01', n))

it('counts days forth and back alike', () => {
  fc.assert(fc.property(day, fc.integer({ min: -40_000, max: 40_000 }), (date, days) => daysBetween(date, addDays(date, days)) === days))
})

it('counts the days since 1970 as the date library does', () => {
  fc.assert(fc.property(day, date => epochDay(date) === daysBetween('1970-01-01', date) && civilDateOf(epochDay(date)) === date))
  expect([epochDay('1970-01-01'), epochDay('1969-12-31'), epochDay('2024-02-29')]).toEqual([0, -1, 19_782])
})

it('moves days that are told in words with it', () => {
  expect(moveSpokenDays('go, 1,000 L on 21 September', '2026-08-21', 77)).toBe('go, 1,000 L on 7 December')
  expect(moveSpokenDays('out by 28 September; 45 kg', '2026-07-20', 0)).toBe('out by 28 September; 45 kg')
})

it('moves the demo by whole weeks, so that its day falls into the week of today', () => {
  fc.assert(fc.property(day, (today) => {
    const shift = weeksBetween('2026-09-14', today)
    return shift % 7 === 0 && mondayOf(addDays('2026-09-14', shift)) === mondayOf(today)
  }))
  expect(weeksBetween('2026-09-14', '2026-09-20')).toBe(0)
  expect(weeksBetween('2026-09-14', '2026-12-01')).toBe(77)
})
