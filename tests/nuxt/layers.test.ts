import { describe, expect, it } from 'vitest'
import { HATCHES, ageStep, bandsOf, beerSigns, usedPatterns } from '~/composables/layers'

const BOX = { x: 8, y: 14, width: 100, height: 100 }
const BEERS = [{ code: 'FB', name: 'Fen Brown', hatch: 'rising' }] as const
const DAY = '2026-09-14'
const layer = (brewCode: string, brewedOn: string, share: number) => ({ brewCode, brewedOn, beerCode: 'FB', share })
const bands = (layers: ReturnType<typeof layer>[], litres = 100) => bandsOf({ layers, litres, workingLitres: 100, box: BOX, day: DAY, beers: BEERS, seed: 'heron' })

describe('the tone of a brew', () => {
  it('is a step a year, newest first, and the last for all that is older', () => {
    expect(['2026-01-01', '2025-12-31', '2018-06-01', '2000-01-01', '2027-01-01'].map(brewedOn => ageStep(brewedOn, DAY))).toEqual([1, 2, 9, 12, 1])
  })
})

describe('the hatch of a beer', () => {
  it('goes by the order in which beers were set up, whatever order they are told in, and begins anew after the last', () => {
    const beers = Array.from({ length: HATCHES.length + 1 }, (_, index) => ({ id: String(100 + index), code: `B${index}`, name: `Beer ${index}` }))
    const signs = beerSigns([...beers].reverse())
    expect(signs.slice(0, 2).map(({ code, hatch }) => [code, hatch])).toEqual([['B0', 'rising'], ['B1', 'dots']])
    expect(signs.at(-1)).toMatchObject({ hatch: 'rising' })
  })

  it('is crosses for beer that is none of ours', () => {
    expect(usedPatterns([[{ brewCode: 'X', brewedOn: DAY, beerCode: null, share: 1 }]], DAY, BEERS)).toEqual([{ step: 1, hatch: 'crosses' }])
  })
})

describe('the layers of a vessel', () => {
  it('lie with the oldest at the bottom, each as high as its share of what is filled', () => {
    const [young, old] = bands([layer('old', '2020-01-01', 0.25), layer('young', '2026-01-01', 0.75)], 80)
    expect(old).toMatchObject({ key: 'old', foot: 114, top: 94, edge: 'deep' })
    expect(young).toMatchObject({ key: 'young', foot: 94, top: 34, edge: 'surface' })
  })

  it('never rise above the brim', () => {
    expect(bands([layer('one', '2026-01-01', 1)], 150)[0]?.top).toBe(14)
  })

  it('are a pixel high at least, and what is less than a hundredth of a percent lies with the older rest', () => {
    const drawn = bands([layer('crumb', '2019-01-01', 0.00005), layer('thin', '2020-01-01', 0.001), layer('rest', '2026-01-01', 0.99895)])
    expect(drawn.map(({ key }) => key)).toEqual(['rest', 'thin'])
    const thin = drawn[1]
    expect((thin?.foot ?? 0) - (thin?.top ?? 0)).toBe(1)
  })

  it('have the same seams at each visit, in short numbers', () => {
    const two = [layer('old', '2020-01-01', 1 / 3), layer('young', '2026-01-01', 2 / 3)]
    expect(bands(two)).toEqual(bands(two))
    for (const { d } of bands(two)) expect(d).not.toMatch(/NaN|\.\d\d/)
  })
})
