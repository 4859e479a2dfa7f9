import { LOSS_REASONS, METHOD_NAMES, MOVEMENT_KINDS, type LossReason, type Method, type MovementKind } from '#shared/cellar/movement'
import { VESSEL_NAME_MAX } from '#shared/cellar/vessel'
import { BREW_CODE_MAX, LOT_MAX, NOTE_MAX, REASON_MAX, type LineFault } from '#shared/schemas/ledger'
import { CellFault, dateOf, idOf, litresOf, lossOf, textOf, wholeOf, wordOf } from './cells'
import type { Column } from './columns'
import { fromInert } from './inert'

interface AnyLine {
  /** Where it stands in the file; its head is line 1. */
  line: number
  date: string
  id: string | null
  note: string | null
}

/** A movement as a file tells it: vessels and brew by their names. */
export interface MovementLine extends AnyLine {
  act: MovementKind
  vessel: string
  litres: number
  actId: string | null
  actNote: string | null
  placeInDay: number | null
  position: number | null
  method: Method | null
  brew: { code: string, brewedOn: string, ageBandDays: number | null, beerCode: string | null } | null
  lot: string | null
  toVessel: string | null
  lossLitres: number | null
  reason: LossReason | null
}

export interface NoteLine extends AnyLine {
  act: 'note'
  vessel: string
  text: string
  actId: string | null
}

export interface ReversalLine extends AnyLine {
  act: 'reversal'
  reverses: string
  reason: string
}

export type FileLine = MovementLine | NoteLine | ReversalLine

const ACTS = [...MOVEMENT_KINDS, 'note', 'reversal'] as const

export type Cells = Partial<Record<Column, string>>

/** Read one line of a ledger file. Says every cell that cannot be taken, by its column. */
export function readLine(line: number, cells: Cells): { read: FileLine } | { faults: LineFault[] } {
  const faults: LineFault[] = []
  const cell = <Value>(column: Column, read: (text: string) => Value): Value | null => {
    const text = fromInert(cells[column]?.trim() ?? '')
    if (text === '') return null
    try {
      return read(text)
    }
    catch (error) {
      if (!(error instanceof CellFault)) throw error
      faults.push({ line, column, message: error.message })
      return null
    }
  }
  const needed = <Value>(column: Column, read: (text: string) => Value, instead: Value): Value => {
    if ((cells[column]?.trim() ?? '') === '') faults.push({ line, column, message: 'This is needed.' })
    return cell(column, read) ?? instead
  }
  const text = (most: number) => (value: string) => textOf(value, most)

  const act = needed<(typeof ACTS)[number] | null>('act', value => wordOf(value, ACTS), null)
  if (act === null) return { faults }
  const any: AnyLine = { line, date: needed('date', dateOf, ''), id: cell('id', idOf), note: null }
  const read = readAs(act, any, { cell, needed, text })
  return faults.length > 0 ? { faults } : { read }
}

interface Reader {
  cell: <Value>(column: Column, read: (text: string) => Value) => Value | null
  needed: <Value>(column: Column, read: (text: string) => Value, instead: Value) => Value
  text: (most: number) => (value: string) => string
}

function readAs(act: (typeof ACTS)[number], any: AnyLine, { cell, needed, text }: Reader): FileLine {
  if (act === 'reversal') return { ...any, act, reverses: needed('reverses', idOf, ''), reason: needed('note', text(REASON_MAX), '') }
  const vessel = needed('vessel', text(VESSEL_NAME_MAX), '')
  if (act === 'note') return { ...any, act, vessel, text: needed('note', text(NOTE_MAX), ''), actId: cell('actId', idOf) }
  return {
    ...any,
    act,
    vessel,
    litres: needed('litres', litresOf, 0),
    note: cell('note', text(NOTE_MAX)),
    actId: cell('actId', idOf),
    actNote: cell('actNote', text(NOTE_MAX)),
    placeInDay: cell('placeInDay', value => wholeOf(value, 0, 1000)),
    position: cell('position', value => wholeOf(value, 0, 1_000_000)),
    method: cell('method', value => wordOf(value, METHOD_NAMES)),
    brew: act === 'in'
      ? {
          code: needed('target', text(BREW_CODE_MAX), ''),
          brewedOn: needed('brewed', dateOf, ''),
          ageBandDays: cell('ageBand', value => wholeOf(value, 1, 3650)),
          beerCode: cell('beer', text(BREW_CODE_MAX)),
        }
      : null,
    lot: act === 'draw' ? cell('target', text(LOT_MAX)) : null,
    toVessel: act === 'move' ? needed('target', text(VESSEL_NAME_MAX), '') : null,
    lossLitres: act === 'move' ? cell('lossOnWay', lossOf) ?? 0 : null,
    reason: act === 'loss' ? needed('reason', value => wordOf(value, LOSS_REASONS), 'evaporation') : null,
  }
}
