import { beforeAll, describe, expect, it } from 'vitest'
import { agePictureOf } from '../../shared/cellar/agePicture'
import { civilDateOf, epochDay } from '../../shared/cellar/civilDate'
import { replay } from '../../shared/cellar/replay'
import { stackOf } from '../../shared/cellar/stack'
import { demoLedger, type DemoLedger } from '../support/ledgerLines'
import { ExactCellar } from './exactReplay'

let demo: DemoLedger
beforeAll(async () => {
  demo = await demoLedger()
})

/**
 * The cellar on its demo day. Source: computed, by a replay of the same ledger in exact fractions that was written apart
 * from this project. Litres, cohorts, mean age in days, ages at 10, 50 and 90 %, % of 1,096 days and more, oldest and its %.
 */
const ON_THE_DEMO_DAY = [
  ['Heron', 4000, 15, 781.1, 210, 574, 1771, 22.9, 'FB19-1', 1.16],
  ['Bittern', 2400, 9, 792.8, 154, 518, 1981, 27.2, 'MP18-1', 2.40],
  ['Coot', 2000, 8, 342.8, 70, 252, 887, 0, 'CP24-1', 8.90],
  ['Moorhen', 1500, 9, 593.7, 84, 448, 1687, 18.9, 'SP22-1', 10.61],
  ['Grebe', 820, 20, 985.9, 343, 763, 2296, 29.5, 'MP18-1', 2.17],
  ['Plover', 500, 11, 552.0, 70, 441, 1379, 15.4, 'OR21-1', 5.67],
  ['Dunlin', 500, 8, 670.1, 196, 560, 1659, 21.0, 'OR22-1', 14.21],
  ['Curlew', 600, 6, 951.3, 343, 707, 2170, 28.0, 'TD20-1', 16.65],
  ['Snipe Upper', 225, 9, 846.8, 161, 735, 2198, 30.9, 'SN18-1', 4.20],
  ['Snipe Middle', 225, 8, 1803.3, 735, 1827, 2926, 77.9, 'SN18-1', 23.83],
  ['Snipe Lower', 225, 7, 2486.2, 1463, 2926, 2926, 97.6, 'SN18-1', 56.90],
  ['Teal Two', 213, 2, 604.5, 378, 742, 742, 0, 'OR24-4', 62.22],
  ['Teal Three', 180, 1, 861.0, 861, 861, 861, 0, 'MP24-0', 100],
] as const

describe('the demo on its day', () => {
  const on = epochDay('2026-09-14')
  const stackIn = (vessel: string) => stackOf(replay(demo.lines, { throughDay: on }), vessel, on, demo.brewOf)

  it.each(ON_THE_DEMO_DAY)('%s', (vessel, litres, cohorts, mean, p10, p50, p90, over3, oldest, oldestShare) => {
    const stack = stackIn(vessel)
    const ages = agePictureOf(stack)
    expect(stack.litres).toBeCloseTo(litres, 6)
    expect(stack.cohorts).toHaveLength(cohorts)
    expect(ages?.meanDays.toFixed(1)).toBe(mean.toFixed(1))
    expect([ages?.p10Days, ages?.p50Days, ages?.p90Days]).toEqual([p10, p50, p90])
    expect(((ages?.shareOver3Years ?? 0) * 100).toFixed(1)).toBe(over3.toFixed(1))
    expect(ages?.oldest.brew.code).toBe(oldest)
    expect(((ages?.oldest.share ?? 0) * 100).toFixed(2)).toBe(oldestShare.toFixed(2))
    expect(stack.volumeDoubt).toBe(false)
  })

  it('Teal One is empty, to the last drop', () => {
    expect(stackIn('Teal One')).toEqual({ litres: 0, cohorts: [], volumeDoubt: false })
  })

  it('holds 13,388.0 L, 749.4 days old on average; in, out and lost balance', () => {
    const stacks = demo.vessels.map(stackIn)
    const litres = stacks.reduce((sum, stack) => sum + stack.litres, 0)
    const ages = stacks.reduce((sum, stack) => sum + stack.litres * (agePictureOf(stack)?.meanDays ?? 0), 0) / litres
    const total = (kind: string) => demo.lines.filter(line => line.kind === kind).reduce((sum, line) => sum + line.litres, 0)
    const onTheWay = demo.lines.reduce((sum, line) => sum + (line.lossLitres ?? 0), 0)
    expect(litres).toBeCloseTo(13_388, 6)
    expect(ages.toFixed(1)).toBe('749.4')
    expect([total('in'), total('draw'), total('loss'), onTheWay]).toEqual([38_469, 24_175, 866, 40])
  })
})

it('equals an exact replay in fractions, cohort by cohort, in every vessel on every date of the ledger', () => {
  const exact = new ExactCellar()
  const days = [...new Set(demo.lines.map(line => line.day))]
  let compared = 0
  for (const day of days) {
    for (const line of demo.lines.filter(line => line.day === day)) exact.apply(line)
    const cellar = replay(demo.lines, { throughDay: day })
    for (const vessel of demo.vessels) {
      const stack = stackOf(cellar, vessel, day, demo.brewOf)
      const expected = exact.vessel(vessel)
      expect(stack.cohorts.map(cohort => cohort.brew.code).sort(), `${vessel} on ${civilDateOf(day)}`).toEqual([...expected.keys()].sort())
      for (const cohort of stack.cohorts) {
        const right = expected.get(cohort.brew.code)?.valueOf() ?? NaN
        expect(Math.abs(cohort.litres / right - 1), `${vessel} ${cohort.brew.code} on ${civilDateOf(day)}`).toBeLessThan(1e-9)
        compared++
      }
    }
  }
  expect(compared).toBeGreaterThan(3_500)
})
