import { describe, expect, it } from 'vitest'
import type { StackView } from '#shared/schemas/stack'
import { meanShiftWords, partWords, pictureAfter } from '~/composables/whatIf'

const BREW = { brewId: '0190a000-0000-7000-8000-000000000001', ageBandDays: null, beerCode: 'FB' }
const STACK: StackView = {
  vesselId: '0190a000-0000-7000-8000-000000000010', on: '2026-09-14', litres: 4000, meanAgeDays: 500, p10AgeDays: 300, p50AgeDays: 300, p90AgeDays: 1100, shareOver3Years: 0.25, volumeDoubt: false, overBrim: false,
  cohorts: [
    { ...BREW, brewCode: 'FB23-1', brewedOn: '2023-09-10', litres: 1000, share: 0.25, ageDays: 1100 },
    { ...BREW, brewCode: 'FB25-2', brewedOn: '2025-11-18', litres: 3000, share: 0.75, ageDays: 300 },
  ],
}
const fresh = (litres: number) => ({ kind: 'brew', code: 'FB26-2', brewedOn: '2026-08-10', beerCode: 'FB', litres }) as const

describe('what an act would do', () => {
  it('is, without one, as it stands', () => {
    expect(pictureAfter(STACK, { out: 0, incoming: [] })).toMatchObject({ litres: 4000, ages: { mean: 500, p10: 300, p90: 1100 } })
  })

  it('takes the same share of each layer out, and lays the new brew on top', () => {
    const after = pictureAfter(STACK, { out: 1000, incoming: [fresh(1000)] })
    expect(after.litres).toBe(4000)
    expect(after.ages?.mean).toBeCloseTo((3000 * 500 + 1000 * 35) / 4000, 9)
    expect(after.layers.map(({ brewCode, share }) => [brewCode, share])).toEqual([['FB23-1', 0.1875], ['FB25-2', 0.5625], ['FB26-2', 0.25]])
  })

  it('joins beer of a brew that is in it already', () => {
    const after = pictureAfter(STACK, { out: 0, incoming: [{ ...fresh(1000), code: 'FB25-2', brewedOn: '2025-11-18' }] })
    expect(after.layers).toHaveLength(2)
  })

  it('empties a vessel out of which more goes than there is', () => {
    expect(pictureAfter(STACK, { out: 9000, incoming: [] })).toEqual({ litres: 0, layers: [], ages: null })
  })

  it('brings beer of another vessel over in the proportions that it has there', () => {
    const empty = { ...STACK, litres: 0, cohorts: [] }
    expect(pictureAfter(empty, { out: 0, incoming: [{ kind: 'stack', stack: STACK, litres: 400 }] })).toMatchObject({ litres: 400, ages: { mean: 500 } })
  })
})

describe('its words', () => {
  const ages = (mean: number) => ({ mean, p10: 0, p50: 0, p90: 0 })
  it.each([
    [ages(788.1), ages(599.8), 'The mean falls by 188\u00A0d to 600\u00A0d.'],
    [ages(500), ages(1600), 'The mean rises by 1,100\u00A0d to 1,600\u00A0d.'],
    [ages(500), ages(500.2), 'The mean stays at 500\u00A0d.'],
    [null, ages(35), 'The mean age is 35\u00A0d after it.'],
    [ages(500), null, 'The vessel is empty after it.'],
  ])('tell what becomes of the mean', (before, after, words) => {
    expect(meanShiftWords(before && { ...before }, after && { ...after })).toBe(words)
  })

  it.each([[1000, 4000, 'a quarter of each layer'], [1010, 4000, '25.3\u00A0% of each layer'], [5000, 4000, 'all of each layer'], [100, 0, '0\u00A0% of each layer']])('tell what part %d of %d is', (litres, of, words) => {
    expect(partWords(litres, of)).toBe(words)
  })
})
