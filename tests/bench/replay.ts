import { PLACE_IN_DAY, type LedgerLine } from '../../shared/cellar/movement'
import { replay } from '../../shared/cellar/replay'

/** A brewery's ledger: so many vessels, each drawn and refilled so many times a year (four, if not said), with a loss before, and a move to its neighbour each fifth year. */
export function bigLedger(vessels: number, years: number, drawsAYear = 4): LedgerLine[] {
  const lines: LedgerLine[] = []
  const say = (kind: LedgerLine['kind'], day: number, vessel: number, litres: number, more: Partial<LedgerLine> = {}) =>
    lines.push({ kind, day, placeInDay: PLACE_IN_DAY[kind], actId: `${day}`, position: vessel, vesselId: `vessel ${vessel}`, litres, ...more })
  for (let vessel = 0; vessel < vessels; vessel++) say('in', 0, vessel, 1000, { brewId: `brew 0 ${vessel}` })
  for (let quarter = 1; quarter <= years * drawsAYear; quarter++) {
    const day = quarter * Math.floor(365 / drawsAYear)
    for (let vessel = 0; vessel < vessels; vessel++) say('loss', day, vessel, 5)
    for (let vessel = 0; vessel < vessels; vessel++) say('draw', day, vessel, 200)
    if (quarter % 20 === 0) for (let vessel = 0; vessel < vessels; vessel += 3) say('move', day, vessel, 50, { toVesselId: `vessel ${(vessel + 1) % vessels}`, lossLitres: 1 })
    for (let vessel = 0; vessel < vessels; vessel++) say('in', day, vessel, 205, { brewId: `brew ${quarter} ${vessel}` })
  }
  return lines
}

/** The floor: litres and mean age alone, in typed arrays, with every name turned into a number beforehand. */
function meanOnly(lines: readonly { kind: number, day: number, from: number, to: number, litres: number }[], vessels: number): Float64Array {
  const litres = new Float64Array(vessels)
  const born = new Float64Array(vessels)
  for (const { kind, day, from, to, litres: amount } of lines) {
    const had = litres[from] ?? 0
    if (kind === 0) {
      litres[from] = had + amount
      born[from] = (had * (born[from] ?? 0) + amount * day) / (had + amount)
    }
    else {
      litres[from] = had - amount
      if (kind === 2) {
        const there = litres[to] ?? 0
        litres[to] = there + amount
        born[to] = (there * (born[to] ?? 0) + amount * (born[from] ?? 0)) / (there + amount)
      }
    }
  }
  return born
}

/** The other way: every cohort multiplied at every draw. */
function eager(lines: readonly LedgerLine[]): Map<string, Map<string, number>> {
  const vessels = new Map<string, Map<string, number>>()
  const get = (id: string) => vessels.get(id) ?? vessels.set(id, new Map()).get(id) ?? new Map<string, number>()
  for (const { kind, vesselId, toVesselId, brewId, litres, lossLitres = 0 } of lines) {
    const vessel = get(vesselId)
    if (kind === 'in') {
      vessel.set(brewId ?? '', (vessel.get(brewId ?? '') ?? 0) + litres)
      continue
    }
    let had = 0
    for (const amount of vessel.values()) had += amount
    const to = kind === 'move' ? get(toVesselId ?? '') : null
    for (const [brew, amount] of vessel) {
      vessel.set(brew, amount * (1 - litres / had))
      if (to) to.set(brew, (to.get(brew) ?? 0) + amount * (litres - lossLitres) / had)
    }
  }
  return vessels
}

export interface ReplayFigures {
  /** Lines a second of our replay ÷ of each. */
  ofMeanOnly: number
  ofEager: number
  /** Time for twice the lines ÷ time for the lines, of twice the vessels; 2 is linear. */
  doubled: number
  milliseconds: number
}

/** Our replay of 60 vessels over 20 years against both, each measured in turns. */
export function benchReplay(): ReplayFigures {
  const lines = bigLedger(60, 20)
  const twice = bigLedger(120, 20)
  const numbers = lines.map(line => ({ kind: line.kind === 'in' ? 0 : line.kind === 'move' ? 2 : 1, day: line.day, from: Number(line.vesselId.slice(7)), to: Number(line.toVesselId?.slice(7) ?? 0), litres: line.litres }))
  const contenders = [() => replay(lines), () => meanOnly(numbers, 60), () => eager(lines), () => replay(twice)]
  const times = contenders.map((): number[] => [])
  for (let round = 0; round < 60; round++) {
    contenders.forEach((run, at) => {
      const started = performance.now()
      run()
      times[at]?.push(performance.now() - started)
    })
  }
  const [ours = NaN, mean = NaN, slow = NaN, doubled = NaN] = times.map(list => list.sort((a, b) => a - b)[Math.floor(list.length / 2)] ?? NaN)
  return { ofMeanOnly: mean / ours, ofEager: slow / ours, doubled: doubled / ours, milliseconds: ours }
}
