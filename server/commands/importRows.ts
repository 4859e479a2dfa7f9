import { v5 } from 'uuid'
import { PLACE_IN_DAY } from '#shared/cellar/movement'
import type { movements } from '#server/database/schema/index'
import type { FileLine, MovementLine } from '#server/ledgerFile/line'
import type { NamedBrew } from './brewsByCode'
import type { CellarState } from './cellarState'
import type { Work } from './work'

/** A row of the file, with the line it stands on. */
export type Placed<Row> = Row & { line: number }

type MovementRow = Required<typeof movements.$inferInsert>

export interface ImportRows {
  acts: { id: string, note: string | null }[]
  /** Brews that are not known yet. */
  brews: NamedBrew[]
  movements: Placed<Omit<MovementRow, 'brewId'> & { brewCode: string | null }>[]
  notes: Placed<{ id: string, actId: string, position: number, vesselId: string, notedOn: string, text: string }>[]
  reversals: Placed<{ id: string, movementId: string, reason: string, reversedOn: string }>[]
}

/**
 * The rows that a ledger file stands for. Ids that it does not bring are made out of its content and the line's place,
 * so that the same file sent again finds what the first one made.
 */
export function importRowsOf(work: Work, lines: readonly FileLine[], state: CellarState, fileHash: string): ImportRows {
  const idOf = (what: string) => v5(`${fileHash}:${what}`, work.brewery.id)
  const vesselIds = new Map(state.vessels.map(vessel => [vessel.name.toLowerCase(), vessel.id]))
  const vesselIdOf = (name: string) => vesselIds.get(name.toLowerCase()) ?? ''
  const known = new Set([...state.brews.values()].map(brew => brew.code))
  const acts = new Map<string, ImportRows['acts'][number]>()
  const positions = new Map<string, number>()
  const brews = new Map<string, NamedBrew>()
  const rows: ImportRows = { acts: [], brews: [], movements: [], notes: [], reversals: [] }

  const placeIn = (actId: string | null, date: string, note: string | null, position: number | null) => {
    const id = actId ?? idOf(`act:${date}`)
    acts.set(id, acts.get(id) ?? { id, note })
    const next = position ?? positions.get(id) ?? 0
    positions.set(id, next + 1)
    return { actId: id, position: next }
  }

  for (const line of lines) {
    const id = line.id ?? idOf(`line:${line.line}`)
    if (line.act === 'reversal') {
      rows.reversals.push({ line: line.line, id, movementId: line.reverses, reason: line.reason, reversedOn: line.date })
    }
    else if (line.act === 'note') {
      rows.notes.push({ line: line.line, id, ...placeIn(line.actId, line.date, null, null), vesselId: vesselIdOf(line.vessel), notedOn: line.date, text: line.text })
    }
    else {
      if (line.brew && !known.has(line.brew.code) && !brews.has(line.brew.code)) brews.set(line.brew.code, namedBrew(line.brew))
      rows.movements.push({
        line: line.line, breweryId: work.brewery.id, id, ...placeIn(line.actId, line.date, line.actNote, line.position),
        kind: line.act, vesselId: vesselIdOf(line.vessel), litres: line.litres, occurredOn: line.date,
        placeInDay: line.placeInDay ?? (line.actId === null ? 0 : PLACE_IN_DAY[line.act]),
        method: line.method, note: line.note, brewCode: line.brew?.code ?? null, lot: line.lot,
        toVesselId: line.toVessel === null ? null : vesselIdOf(line.toVessel), lossLitres: line.lossLitres, reason: line.reason,
      })
    }
  }
  rows.acts = [...acts.values()]
  rows.brews = [...brews.values()]
  return rows
}

function namedBrew({ code, brewedOn, ageBandDays, beerCode }: NonNullable<MovementLine['brew']>): NamedBrew {
  return { code, brewedOn, ...(ageBandDays !== null && { ageBandDays }), ...(beerCode !== null && { beerCode }) }
}
