import { readFileSync } from 'node:fs'
import { epochDay } from '../../shared/cellar/civilDate'
import { inLedgerOrder, PLACE_IN_DAY, type LedgerLine } from '../../shared/cellar/movement'
import type { BrewDates } from '../../shared/cellar/stack'
import { readLedgerFile } from '../../server/ledgerFile/read'

export interface DemoLedger {
  lines: LedgerLine[]
  brewOf: (id: string) => BrewDates
  vessels: string[]
}

/** The demo's ledger as the engine reads it; vessels and brews bear their names for ids. */
export async function demoLedger(): Promise<DemoLedger> {
  const file = await readLedgerFile(readFileSync('dev/ledger.csv', 'utf8'))
  const brews = new Map<string, BrewDates>()
  const lines = file.lines.flatMap((line, position): LedgerLine[] => {
    if (line.act === 'note' || line.act === 'reversal') return []
    if (line.brew) brews.set(line.brew.code, { id: line.brew.code, code: line.brew.code, brewedDay: epochDay(line.brew.brewedOn) })
    return [{
      kind: line.act, day: epochDay(line.date), placeInDay: 0, actId: line.date, position, vesselId: line.vessel, litres: line.litres,
      ...(line.brew && { brewId: line.brew.code }),
      ...(line.toVessel !== null && { toVesselId: line.toVessel, lossLitres: line.lossLitres ?? 0 }),
    }]
  })
  return { lines: lines.sort(inLedgerOrder), brewOf: brewFinder(brews), vessels: [...new Set(lines.flatMap(line => line.toVesselId ? [line.vesselId, line.toVesselId] : [line.vesselId]))] }
}

export function brewFinder(brews: ReadonlyMap<string, BrewDates>): (id: string) => BrewDates {
  return (id) => {
    const brew = brews.get(id)
    if (!brew) throw new Error(`no brew ${id}`)
    return brew
  }
}

/** Lines written short, for vessels and brews that are their own names. `day` is also the age of nought of a brew `@day`. */
export function line(kind: LedgerLine['kind'], day: number, vesselId: string, litres: number, more: Partial<LedgerLine> = {}): LedgerLine {
  return { kind, day, placeInDay: PLACE_IN_DAY[kind], actId: 'act', position: 0, vesselId, litres, ...more }
}

/** An `in` of a brew whose code is its brew day. */
export function fill(day: number, vesselId: string, litres: number, brewedDay = day, more: Partial<LedgerLine> = {}): LedgerLine {
  return line('in', day, vesselId, litres, { brewId: String(brewedDay), ...more })
}

/** Finds the brews of `fill()`. */
export const brewOfDay = (id: string): BrewDates => ({ id, code: id, brewedDay: Number(id) })
