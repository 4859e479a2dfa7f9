import type { LineFault } from '#shared/schemas/ledger'
import type { FileLine, MovementLine } from '#server/ledgerFile/line'
import type { CellarState } from './cellarState'

/** What is wrong with lines that each read well by themselves: names that nothing bears, days that cannot be, codes with two days. */
export function importFaults(lines: readonly FileLine[], state: CellarState, today: string): LineFault[] {
  const vessels = new Set(state.vessels.map(vessel => vessel.name.toLowerCase()))
  const brewDays = new Map([...state.brews.values()].map(brew => [brew.code, { brewedOn: brew.brewedOn, line: 0 }]))
  const ids = new Map<string, number>()
  const faults: LineFault[] = []
  for (const line of lines) {
    const say = (column: string, message: string) => faults.push({ line: line.line, column, message })
    if (line.date > today) say('date', 'This day has not come yet.')
    if (line.date < '1970-01-01') say('date', 'The ledger begins with 1970.')
    if (line.id !== null) {
      const first = ids.get(line.id)
      if (first !== undefined) say('id', `Line ${first} has this id.`)
      ids.set(line.id, line.line)
    }
    if (line.act === 'reversal') continue
    if (!vessels.has(line.vessel.toLowerCase())) say('vessel', `No vessel here is named ${line.vessel}.`)
    if (line.act !== 'note') moveFaults(line, vessels, say)
    if (line.act !== 'note' && line.brew) brewFaults(line.brew, line, brewDays, say)
  }
  return faults
}

type Say = (column: string, message: string) => void

function moveFaults(line: MovementLine, vessels: ReadonlySet<string>, say: Say): void {
  if (line.toVessel === null) return
  if (!vessels.has(line.toVessel.toLowerCase())) say('target', `No vessel here is named ${line.toVessel}.`)
  if (line.toVessel.toLowerCase() === line.vessel.toLowerCase()) say('target', 'Beer cannot be moved into the vessel that it is in.')
  if ((line.lossLitres ?? 0) > line.litres) say('lossOnWay', 'More is lost on the way than leaves the vessel.')
}

function brewFaults({ code, brewedOn }: NonNullable<MovementLine['brew']>, line: MovementLine, brewDays: Map<string, { brewedOn: string, line: number }>, say: Say): void {
  const known = brewDays.get(code)
  if (known && known.brewedOn !== brewedOn) {
    say('brewed', `Brew ${code} was brewed on ${known.brewedOn}${known.line > 0 ? `, says line ${known.line}` : ''}. One code has one brew day.`)
  }
  if (!known) brewDays.set(code, { brewedOn, line: line.line })
  if (brewedOn > line.date) say('brewed', 'It cannot be racked before it was brewed.')
}
