import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { agePictureOf } from '../../shared/cellar/agePicture'
import { inLedgerOrder, type LedgerLine } from '../../shared/cellar/movement'
import { replay } from '../../shared/cellar/replay'
import { stackOf, type Stack } from '../../shared/cellar/stack'
import { brewOfDay, fill, line } from '../support/ledgerLines'

const VESSELS = ['A', 'B', 'C', 'D']
const litres = fc.integer({ min: 1, max: 2_000_000 }).map(thousandths => thousandths / 1000)
const day = fc.integer({ min: 100, max: 1_000 })
const vessel = fc.constantFrom(...VESSELS)

const anyLine: fc.Arbitrary<LedgerLine> = fc.oneof(
  { weight: 4, arbitrary: fc.record({ day, vessel, litres, age: fc.integer({ min: 0, max: 90 }) }).map(({ day, vessel, litres, age }) => fill(day, vessel, litres, day - age)) },
  { weight: 3, arbitrary: fc.record({ kind: fc.constantFrom('draw' as const, 'loss' as const, 'sample' as const), day, vessel, litres }).map(({ kind, day, vessel, litres }) => line(kind, day, vessel, litres / 10)) },
  { weight: 2, arbitrary: fc.record({ day, from: fc.integer({ min: 0, max: 3 }), hop: fc.integer({ min: 1, max: 3 }), litres, lost: fc.integer({ min: 0, max: 100 }) }).map(({ day, from, hop, litres, lost }) =>
    line('move', day, VESSELS[from] ?? 'A', litres / 4, { toVesselId: VESSELS[(from + hop) % 4] ?? 'B', lossLitres: litres * lost / 1000 / 4 })) },
)
const ledger = fc.array(anyLine, { maxLength: 80 }).map(lines => lines.map((one, position) => ({ ...one, actId: `act ${position % 7}`, position })).sort(inLedgerOrder))

const stacks = (lines: readonly LedgerLine[]) => VESSELS.map(vessel => stackOf(replay(lines), vessel, 1_000, brewOfDay))
const near = (a: number, b: number) => Math.abs(a - b) <= 1e-9 * Math.max(1, Math.abs(a), Math.abs(b))

function alike(a: Stack[], b: Stack[]): boolean {
  return a.every((stack, at) => {
    const other = b[at]
    return other !== undefined && near(stack.litres, other.litres) && stack.cohorts.length === other.cohorts.length
      && stack.cohorts.every((cohort, n) => cohort.brew.id === other.cohorts[n]?.brew.id && near(cohort.litres, other.cohorts[n].litres))
  })
}

describe('whatever the ledger says', () => {
  it('the litres of the cohorts are the litres of the vessel, and never below nought', () => {
    fc.assert(fc.property(ledger, lines => stacks(lines).every(({ litres, cohorts }) =>
      litres >= 0 && near(cohorts.reduce((sum, cohort) => sum + cohort.litres, 0), litres) && cohorts.every(cohort => cohort.litres >= 0))))
  })

  it('shares sum to 1, and ages lie between the youngest and the oldest', () => {
    fc.assert(fc.property(ledger, lines => stacks(lines).every((stack) => {
      const ages = agePictureOf(stack)
      if (!ages) return stack.cohorts.length === 0
      const all = stack.cohorts.map(cohort => cohort.ageDays)
      return near(stack.cohorts.reduce((sum, cohort) => sum + cohort.share, 0), 1)
        && ages.meanDays >= Math.min(...all) - 1e-6 && ages.meanDays <= Math.max(...all) + 1e-6
        && ages.p10Days <= ages.p50Days && ages.p50Days <= ages.p90Days && all.includes(ages.p90Days)
    })))
  })

  it('what came in is what is there, was drawn and was lost, where no more was taken than there was', () => {
    fc.assert(fc.property(ledger, (lines) => {
      const all = stacks(lines)
      fc.pre(!all.some(stack => stack.volumeDoubt))
      const sum = (of: (line: LedgerLine) => number) => lines.reduce((total, one) => total + of(one), 0)
      const there = all.reduce((total, stack) => total + stack.litres, 0)
      const lost = sum(one => one.kind === 'move' ? one.lossLitres ?? 0 : 0)
      return near(sum(one => one.kind === 'in' ? one.litres : 0), there + sum(one => ['draw', 'loss', 'sample'].includes(one.kind) ? one.litres : 0) + lost)
    }))
  })

  it('the order in which lines arrived plays no part', () => {
    fc.assert(fc.property(ledger, fc.infiniteStream(fc.nat()), (lines, chance) => {
      const shuffled = lines.map(one => ({ one, at: chance.next().value ?? 0 })).sort((a, b) => a.at - b.at).map(({ one }) => one)
      return alike(stacks(lines), stacks(shuffled.sort(inLedgerOrder)))
    }))
  })

  it('a line struck out and entered again, as a new line of another act, changes nothing', () => {
    fc.assert(fc.property(ledger, fc.nat(), (lines, pick) => {
      const alone = lines.filter(one => lines.every(other => other === one || other.day !== one.day))
      const struck = alone[pick % Math.max(1, alone.length)]
      fc.pre(struck !== undefined)
      const again = [...lines.filter(one => one !== struck), { ...struck, actId: 'a later act', position: 99 }].sort(inLedgerOrder)
      return alike(stacks(lines), stacks(again))
    }))
  })

  it('what is no beer takes room, is drawn off with the rest, and has no age', () => {
    fc.assert(fc.property(ledger, day, litres, (lines, when, amount) => {
      const whole = [...lines, line('addition', when, 'A', amount, { actId: 'fruit' })].sort(inLedgerOrder)
      return stacks(whole).every((stack) => {
        const share = stack.cohorts.reduce((sum, cohort) => sum + cohort.share, 0)
        const beer = stack.cohorts.reduce((sum, cohort) => sum + cohort.litres, 0)
        return share <= 1 + 1e-9 && beer <= stack.litres * (1 + 1e-9) + 1e-9
      })
    }))
    const [a] = stacks([fill(10, 'A', 100), line('addition', 20, 'A', 100), line('draw', 30, 'A', 100)])
    expect(a).toMatchObject({ litres: 100, cohorts: [{ litres: 50, share: 0.5 }] })
    expect(agePictureOf(a ?? { litres: 0, cohorts: [], volumeDoubt: false })?.meanDays).toBe(990)
    expect(agePictureOf(stacks([line('addition', 20, 'A', 100)])[0] ?? { litres: 0, cohorts: [], volumeDoubt: false })).toBeNull()
  })

  it('a draw split in two on one day gives the same', () => {
    fc.assert(fc.property(ledger, fc.integer({ min: 1, max: 99 }), (lines, percent) => {
      const at = lines.findIndex(one => one.kind === 'draw')
      fc.pre(at >= 0 && !stacks(lines).some(stack => stack.volumeDoubt))
      const whole = lines[at] as LedgerLine
      const split = [...lines.slice(0, at), { ...whole, litres: whole.litres * percent / 100 }, { ...whole, litres: whole.litres * (100 - percent) / 100 }, ...lines.slice(at + 1)]
      return alike(stacks(lines), stacks(split))
    }))
  })
})

describe('more out than there was', () => {
  it('empties the vessel and marks it, until the missing line arrives', () => {
    const lines = [fill(10, 'A', 100), line('draw', 20, 'A', 150)]
    expect(stacks(lines)[0]).toEqual({ litres: 0, cohorts: [], volumeDoubt: true })
    const late = [fill(10, 'A', 100), fill(15, 'A', 80), line('draw', 20, 'A', 150)]
    expect(stacks(late)[0]).toMatchObject({ litres: 30, volumeDoubt: false })
  })

  it('a move brings over what was there, less the loss, never below nought', () => {
    const moved = (litres: number, lossLitres: number) => stacks([fill(10, 'A', 100), line('move', 20, 'A', litres, { toVesselId: 'B', lossLitres })])
    expect(moved(150, 20).map(stack => [stack.litres, stack.volumeDoubt])).toEqual([[0, true], [80, false], [0, false], [0, false]])
    expect(moved(150, 120)[1]).toMatchObject({ litres: 0, cohorts: [] })
  })
})

it('a move that brings nothing is no refill', () => {
  const cellar = replay([fill(10, 'A', 100), fill(10, 'B', 100), line('move', 20, 'A', 5, { toVesselId: 'B', lossLitres: 5 }), line('move', 30, 'C', 5, { toVesselId: 'B', lossLitres: 0 })])
  expect(cellar.vessels.get('B')?.lastRefillDay).toBeNull()
})

it('an emptied vessel keeps no residue, however it was emptied', () => {
  const lines = [fill(1, 'A', 0.1), fill(2, 'A', 0.2), line('draw', 3, 'A', 0.3)]
  expect(stacks(lines)[0]).toEqual({ litres: 0, cohorts: [], volumeDoubt: false })
})

it('a thousand draws of nine tenths lose no litre to small numbers', () => {
  const lines: LedgerLine[] = [fill(1, 'A', 1000)]
  for (let n = 2; n < 1_000; n++) lines.push(line('draw', n, 'A', 900), fill(n, 'A', 900))
  const stack = stacks(lines)[0]
  expect(stack?.litres).toBeCloseTo(1000, 9)
  expect(stack?.cohorts.reduce((sum, cohort) => sum + cohort.litres, 0)).toBeCloseTo(1000, 9)
})

it('five thousand lines with forty moves among twelve vessels sum to the book volume', () => {
  let seed = 7
  const random = () => {
    seed = (seed * 48_271) % 2_147_483_647
    return seed / 2_147_483_647
  }
  const lines: LedgerLine[] = Array.from({ length: 12 }, (_, n) => fill(0, `V${n}`, 1000))
  const book = new Map(lines.map(one => [one.vesselId, 1000]))
  for (let n = 1; lines.length < 5_000; n++) {
    const vessel = `V${Math.floor(random() * 12)}`
    const litres = Math.round(random() * 100_000) / 1000 + 0.001
    if (n % 60 === 0) {
      const to = `V${(Number(vessel.slice(1)) + 1) % 12}`
      lines.push(line('move', n, vessel, litres, { toVesselId: to, lossLitres: 0 }), line('draw', n, to, litres, { placeInDay: 5 }), fill(n, vessel, litres, n, { placeInDay: 6 }))
    }
    else {
      lines.push(line('draw', n, vessel, litres), fill(n, vessel, litres))
    }
  }
  const cellar = replay(lines)
  for (const vessel of book.keys()) {
    const { cohorts } = stackOf(cellar, vessel, 10_000, brewOfDay)
    expect(Math.abs(cohorts.reduce((sum, cohort) => sum + cohort.litres, 0) - (book.get(vessel) ?? 0)), vessel).toBeLessThan(0.05)
  }
})

it('knows first racking and first wood of each parcel', () => {
  const lines = [fill(10, 'A', 100, 1), line('move', 40, 'A', 50, { toVesselId: 'B', lossLitres: 0 }), line('move', 70, 'B', 20, { toVesselId: 'C', lossLitres: 0 })]
  const cellar = replay(lines, { wooden: new Set(['B']) })
  const kindIn = (vessel: string) => cellar.parcelKinds[cellar.vessels.get(vessel)?.parcels[0] ?? -1]
  expect(kindIn('A')).toMatchObject({ firstRackedOn: 10, firstWoodOn: null })
  expect(kindIn('B')).toMatchObject({ firstRackedOn: 10, firstWoodOn: 40 })
  expect(kindIn('C')).toMatchObject({ firstRackedOn: 10, firstWoodOn: 40 })
})
