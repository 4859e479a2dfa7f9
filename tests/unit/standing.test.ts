import { describe, expect, it } from 'vitest'
import { standingOf, type LedgerFacts } from '../../shared/cellar/standing'
import { workingLitresOn, type VesselEvent, type VesselEventKind } from '../../shared/cellar/vesselEvent'

const full: LedgerFacts = { litres: 500, workingLitres: 500, lastDrawDay: 50, lastRefillDay: 50 }
const empty: LedgerFacts = { ...full, litres: 0 }
const happened = (...events: [VesselEventKind, number][]): VesselEvent[] => events.map(([kind, day]) => ({ kind, day, reason: `because ${kind}` }))
const standing = (events: VesselEvent[], facts = full, day = 100) => standingOf(events, facts, day).standing

describe('the standing', () => {
  it('of a vessel with beer and nothing going on is resting', () => {
    expect(standing([])).toBe('resting')
  })

  it.each([[54, 'settling'], [55, 'resting']] as const)('after a refill on day 50 on day %d is %s', (day, expected) => {
    expect(standing([], full, day)).toBe(expected)
  })

  it.each([[63, 'settling'], [64, 'resting']] as const)('of a large vessel on day %d is %s', (day, expected) => {
    expect(standing([], { ...full, workingLitres: 4000 }, day)).toBe(expected)
  })

  it('is called after a verdict until the draw', () => {
    expect(standing(happened(['called', 60]))).toBe('called')
    expect(standing(happened(['called', 40]))).toBe('resting')
    expect(standing(happened(['called', 60], ['held', 70]))).toBe('held')
    expect(standing(happened(['held', 60], ['called', 70]))).toBe('called')
  })

  it('is set apart until freed, whatever the verdict', () => {
    expect(standing(happened(['called', 60], ['setApart', 70]))).toBe('setApart')
    expect(standing(happened(['setApart', 70], ['freed', 80]))).toBe('resting')
  })

  it('of an empty vessel is dry, or soaking while it soaks', () => {
    expect(standing([], empty)).toBe('dry')
    expect(standingOf(happened(['emptied', 90]), empty, 100)).toMatchObject({ standing: 'dry', sinceDay: 90, reason: 'because emptied' })
    expect(standing(happened(['emptied', 90], ['soaking', 95]), empty)).toBe('soaking')
    expect(standing(happened(['soaking', 95], ['soaked', 97]), empty)).toBe('dry')
  })

  it('is away before all that, and retired for good', () => {
    expect(standing(happened(['setApart', 70], ['away', 80]))).toBe('away')
    expect(standing(happened(['away', 80], ['back', 90]))).toBe('resting')
    expect(standing(happened(['retired', 80], ['away', 85]))).toBe('retired')
  })

  it('knows nothing of tomorrow', () => {
    expect(standing(happened(['setApart', 101]))).toBe('resting')
  })

  it('says beside itself what else goes on, while there is beer', () => {
    expect(standingOf(happened(['fruitIn', 60], ['gravityWatch', 70]), full, 100)).toMatchObject({ standing: 'resting', fruiting: true, gravityWatch: true })
    expect(standingOf(happened(['fruitIn', 60], ['fruitOut', 70]), full, 100)).toMatchObject({ fruiting: false })
    expect(standingOf(happened(['fruitIn', 60]), empty, 100)).toMatchObject({ fruiting: false })
  })
})

it('what a vessel held on a day is what it held before the next resize', () => {
  const resizes = [{ day: 10, fromLitres: 225, toLitres: 300 }, { day: 20, fromLitres: 300, toLitres: 500 }]
  expect([5, 10, 15, 20, 25].map(day => workingLitresOn(day, 500, resizes))).toEqual([225, 300, 300, 500, 500])
})
