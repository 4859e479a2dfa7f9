import { describe, expect, it } from 'vitest'
import { agePictureOf } from '../../shared/cellar/agePicture'
import type { LedgerLine } from '../../shared/cellar/movement'
import { replay } from '../../shared/cellar/replay'
import { stackOf, type Stack } from '../../shared/cellar/stack'
import { brewOfDay, fill, line } from '../support/ledgerLines'

/*
 * Mean ages and tails of fractional blending, driven through the ledger. Source of every figure: computed, by closed
 * forms that a brute-force cohort ledger in fractions equals exactly; the mean is that of M. A. Baker, M. A. Amerine and
 * E. B. Roessler, "Theory and application of fractional-blending systems", Hilgardia 21 (1952), from memory.
 */

const YEAR = 360
const before = (day: number) => day - 1

/** The stack of the vessel on a day, before anything of that day. */
function justBefore(lines: readonly LedgerLine[], day: number, vessel = 'V'): Stack {
  return stackOf(replay(lines, { throughDay: before(day) }), vessel, day, brewOfDay)
}

const meanIn = (stack: Stack, unit = YEAR) => (agePictureOf(stack)?.meanDays ?? NaN) / unit

/** A vessel that is filled on day 0 and drawn from at each of these days by that share, refilled the same day with beer of an age. */
function drawn(draws: readonly { day: number, share: number }[], refillAge = 0): LedgerLine[] {
  return [fill(0, 'V', 1000, -refillAge), ...draws.flatMap(({ day, share }) => [line('draw', day, 'V', 1000 * share), fill(day, 'V', 1000 * share, day - refillAge)])]
}

const every = (interval: number, hold: number, share: number, count: number) => Array.from({ length: count }, (_, n) => ({ day: hold + n * interval, share }))

describe('one vessel, drawn by a share each year from the first', () => {
  it.each([
    [1 / 2, 1, 1], [1 / 2, 2, 1.5], [1 / 2, 3, 1.75], [1 / 2, 5, 1.9375], [1 / 2, 10, 1.998046875],
    [1 / 3, 2, 5 / 3], [1 / 3, 3, 19 / 9], [1 / 3, 5, 211 / 81], [1 / 3, 10, 58025 / 19683],
    [1 / 4, 2, 1.75], [1 / 4, 3, 2.3125], [1 / 4, 4, 2.734375], [1 / 4, 5, 3.05078125], [1 / 4, 10, 989527 / 262144], [1 / 4, 20, 3.987315152],
    [1 / 5, 2, 1.8], [1 / 5, 5, 3.3616], [1 / 5, 10, 8717049 / 1953125],
    [1 / 10, 2, 1.9], [1 / 10, 5, 4.0951], [1 / 10, 10, 6.513215599], [1 / 10, 20, 8.784233454], [1 / 10, 50, 9.948462248],
  ])('share %d: at draw %d the mean is %d years', (share, n, mean) => {
    const stack = justBefore(drawn(every(YEAR, YEAR, share, n)), n * YEAR)
    expect(meanIn(stack)).toBeCloseTo(mean, 8)
    const first = stack.cohorts[0]
    expect(first?.share).toBeCloseTo((1 - share) ** (n - 1), 9)
  })

  it.each([
    ['hold of 3, draw 1', 1 / 4, 3, 1, 3], ['hold of 3, draw 2', 1 / 4, 3, 2, 3.25], ['hold of 3, draw 6', 1 / 4, 3, 6, 3853 / 1024],
    ['hold of interval ÷ share: on target from the first', 1 / 4, 4, 7, 4], ['a longer hold falls towards it', 1 / 4, 6, 3, 5.125],
  ])('%s', (_, share, hold, n, mean) => {
    const day = (hold + n - 1) * YEAR
    expect(meanIn(justBefore(drawn(every(YEAR, hold * YEAR, share, n)), day))).toBeCloseTo(mean, 8)
  })

  it('with a refill of a twelfth, twice a year, held one year: 14767/7500 at the fifth draw', () => {
    const draws = every(YEAR / 2, YEAR, 1 / 5, 5)
    expect(meanIn(justBefore(drawn(draws, YEAR / 12), draws[4]?.day ?? 0))).toBeCloseTo(14767 / 7500, 8)
  })

  it('after refill of draw 3 by a quarter: 111/64', () => {
    const lines = drawn(every(YEAR, YEAR, 1 / 4, 3))
    expect(meanIn(stackOf(replay(lines), 'V', 3 * YEAR, brewOfDay))).toBeCloseTo(111 / 64, 8)
  })

  it.each([[1 / 4, 3, 9], [1 / 10, 7, 22]])('in the long run of a share of %d the median is %d and 90 %% are %d intervals old', (share, median, ninetieth) => {
    const ages = agePictureOf(justBefore(drawn(every(YEAR, YEAR, share, 200)), 200 * YEAR))
    expect([ages?.p50Days, ages?.p90Days]).toEqual([median * YEAR, ninetieth * YEAR])
  })

  it('of a vessel drawn by a tenth ten times 0.34867844 of the first fill are left', () => {
    const stack = stackOf(replay(drawn(every(YEAR, YEAR, 1 / 10, 10))), 'V', 10 * YEAR, brewOfDay)
    expect(stack.cohorts[0]?.share).toBeCloseTo(0.3486784401, 9)
  })
})

it('an irregular schedule: refill a month old, after 6, 3, 4 and 12 months, by 1/4, 1/3, 1/5 and 1/2', () => {
  const month = 30
  const days = [6, 9, 13, 25].map(months => months * month)
  const shares = [1 / 4, 1 / 3, 1 / 5, 1 / 2]
  const lines = drawn(days.map((day, n) => ({ day, share: shares[n] ?? 0 })), month)
  const expected = [[[7, 1]], [[10, 3 / 4], [4, 1 / 4]], [[14, 1 / 2], [8, 1 / 6], [5, 1 / 3]], [[26, 2 / 5], [20, 2 / 15], [17, 4 / 15], [13, 1 / 5]]] as const
  days.forEach((day, n) => {
    const stack = justBefore(lines, day)
    expect(stack.cohorts.map(cohort => cohort.ageDays / month)).toEqual(expected[n]?.map(([age]) => age))
    stack.cohorts.forEach((cohort, at) => expect(cohort.share).toBeCloseTo(expected[n]?.[at]?.[1] ?? NaN, 12))
    expect(meanIn(stack, month)).toBeCloseTo([7, 8.5, 10, 20.2][n] ?? NaN, 10)
  })
})

/** A cascade: each year the oldest tier is drawn, then refilled from the next younger, the youngest with fresh beer. */
function cascade(volumes: readonly number[], step: number, years: number): LedgerLine[] {
  const tier = (n: number) => `T${n}`
  const lines = volumes.map((litres, n) => fill(0, tier(n), litres))
  for (let year = 1; year <= years; year++) {
    const day = year * YEAR
    lines.push(line('draw', day, tier(volumes.length - 1), step))
    for (let n = volumes.length - 1; n > 0; n--) lines.push(line('move', day, tier(n - 1), step, { toVesselId: tier(n), lossLitres: 0, position: volumes.length - n }))
    lines.push(fill(day, tier(0), step, day))
  }
  return lines
}

describe('cascades, just before the draw', () => {
  it.each([
    [2, 1 / 2, 4, 13 / 4], [4, 1 / 2, 5, 79 / 16], [4, 1 / 2, 8, 221 / 32], [2, 1 / 4, 5, 1157 / 256], [3, 1 / 4, 5, 1263 / 256],
    [4, 1 / 4, 10, 9823 / 1024], [3, 1 / 3, 6, 457 / 81], [8, 1 / 2, 20, 15.5653], [5, 1 / 4, 30, 19.4078], [8, 1 / 10, 50, 49.0363], [4, 1 / 10, 50, 35.9904],
  ])('%d tiers, share %d, year %d: the oldest tier is %d years old', (tiers, share, year, mean) => {
    const lines = cascade(Array.from({ length: tiers }, () => 300), 300 * share, year)
    expect(meanIn(justBefore(lines, year * YEAR, `T${tiers - 1}`))).toBeCloseTo(mean, 4)
  })

  it('tiers of 100, 150 and 300 L with steps of 30 L, after 5 and 10 years', () => {
    const lines = cascade([100, 150, 300], 30, 10)
    const means = (year: number) => [0, 1, 2].map(n => meanIn(justBefore(lines, year * YEAR, `T${n}`)))
    const at = (year: number, expected: number[]) => means(year).forEach((mean, n) => expect(mean).toBeCloseTo(expected[n] ?? NaN, 9))
    at(5, [2.7731, 4.5386, 4.9736])
    at(10, [3.239174917, 6.91103743, 9.38943445])
  })

  it('three tiers of 300 L, refill 28 days old, a step of 100 L every 365 days: 978.80, 1,569.11 and 1,798.93 days before the fifth draw', () => {
    const lines: LedgerLine[] = [0, 1, 2].map(n => fill(0, `T${n}`, 300, -28))
    for (let n = 1; n <= 5; n++) {
      lines.push(line('draw', n * 365, 'T2', 100), line('move', n * 365, 'T1', 100, { toVesselId: 'T2', position: 1 }), line('move', n * 365, 'T0', 100, { toVesselId: 'T1', position: 2 }), fill(n * 365, 'T0', 100, n * 365 - 28))
    }
    expect([0, 1, 2].map(n => meanIn(justBefore(lines, 5 * 365, `T${n}`), 1).toFixed(2))).toEqual(['978.80', '1569.11', '1798.93'])
  })
})

describe('where beer is, and how old', () => {
  const day = (date: string) => Date.parse(date) / 86_400_000
  const racked = (on: string, vessel: string, litres: number, brewed: string) => fill(day(on), vessel, litres, day(brewed))
  const lines: LedgerLine[] = [
    racked('2024-01-01', 'A', 600, '2023-02-06'), racked('2024-03-01', 'A', 200, '2024-02-05'), racked('2024-01-02', 'B', 300, '2023-06-05'),
    line('draw', day('2024-09-02'), 'A', 200), line('move', day('2024-09-02'), 'A', 100, { toVesselId: 'B' }),
    racked('2024-11-04', 'A', 300, '2024-10-07'),
    line('draw', day('2025-01-06'), 'B', 80), racked('2025-01-06', 'B', 80, '2024-12-02'),
    line('draw', day('2025-06-02'), 'A', 400),
  ].sort((a, b) => a.day - b.day || a.placeInDay - b.placeInDay)
  const at = (date: string, vessel: string) => stackOf(replay(lines, { throughDay: day(date) - 1 }), vessel, day(date), brewOfDay)
  const share = (stack: Stack, brewed: string) => stack.cohorts.find(cohort => cohort.brew.brewedDay === day(brewed))?.share

  it('a lot is followed forward through a move between vessels', () => {
    expect(share(at('2024-09-02', 'A'), '2024-02-05')).toBeCloseTo(0.25, 12)
    expect(share(at('2025-01-06', 'B'), '2024-02-05')).toBeCloseTo(0.0625, 12)
    expect(share(at('2025-06-02', 'A'), '2024-02-05')).toBeCloseTo(0.15625, 12)
    expect(share(at('2025-06-03', 'A'), '2024-02-05')).toBeCloseTo(0.15625, 12)
    expect(share(at('2025-06-03', 'B'), '2024-02-05')).toBeCloseTo(0.05, 12)
  })

  it('a run is followed back to its brews: 60, 15 and 5 L of 80, 588 days old on average', () => {
    const run = at('2025-01-06', 'B')
    expect(['2023-06-05', '2023-02-06', '2024-02-05'].map(brewed => (share(run, brewed) ?? 0) * 80)).toEqual([60, 15, 5].map(litres => expect.closeTo(litres, 9)))
    expect(meanIn(run, 1)).toBeCloseTo(588, 6)
    expect(meanIn(at('2024-09-02', 'A'), 1)).toBeCloseTo(483, 6)
    expect(meanIn(at('2025-06-02', 'A'), 1)).toBeCloseTo(561.75, 6)
  })
})

it('a barrel that loses 5 % a year, drawn by 75 L every 365 days, tends to 987.17 days and not to 1,130', () => {
  const lines: LedgerLine[] = [fill(0, 'V', 225, -35)]
  const years = 60
  for (let n = 1; n <= years; n++) lines.push(line('loss', n * 365, 'V', 11.25), line('draw', n * 365, 'V', 75, { position: 1 }), fill(n * 365, 'V', 86.25, n * 365 - 35))
  expect(meanIn(justBefore(lines, years * 365), 1).toFixed(2)).toBe('987.17')
})
