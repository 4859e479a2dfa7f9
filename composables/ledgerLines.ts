import type { MovementKind } from '#shared/cellar/movement'
import type { MovementView, VesselLedger } from '#shared/schemas/ledger'
import { plainDate } from './civilDate'
import { litreWords } from './vesselWords'

/** A line of a vessel's ledger as it is read. */
export interface LedgerRow {
  line: MovementView
  /** What it is, from where this vessel stands: `Draw`, `Moved in`. */
  word: string
  /** What leaves is below nought. */
  change: number
  what: string
  /** Litres in the vessel after it; null for a line that is struck out. */
  then: number | null
}

/** Lines that were recorded as one. */
export interface LedgerAct {
  id: string
  occurredOn: string
  rows: LedgerRow[]
  note: string | null
  recordedByName: string
  recordedAt: string
}

export const LINE_WORDS: Record<MovementKind, string> = { in: 'In', draw: 'Draw', move: 'Move', loss: 'Loss', sample: 'Sample', addition: 'Addition' }

/** By how much a line changes a vessel. */
export function changeIn(line: MovementView, vesselId: string): number {
  if (line.kind === 'in' || line.kind === 'addition') return line.litres
  if (line.kind === 'move' && line.toVesselId === vesselId) return Math.max(0, line.litres - (line.lossLitres ?? 0))
  return -line.litres
}

/** The ledger of a vessel by acts, newest first, with the litres after each line. */
export function ledgerActs({ movements, acts }: VesselLedger, vesselId: string): LedgerAct[] {
  const recorded = new Map(acts.map(act => [act.id, act]))
  let litres = 0
  const rows = [...movements].reverse().map((line): LedgerRow => {
    const change = changeIn(line, vesselId)
    const had = litres
    if (line.reversal === null) litres = Math.max(0, litres + change)
    return { line, word: wordOf(line, vesselId, had), change, what: whatOf(line, vesselId), then: line.reversal === null ? litres : null }
  }).reverse()
  const grouped: LedgerAct[] = []
  for (const row of rows) {
    const last = grouped.at(-1)
    if (last?.id === row.line.actId && last.occurredOn === row.line.occurredOn) {
      last.rows.push(row)
      continue
    }
    const act = recorded.get(row.line.actId)
    grouped.push({ id: row.line.actId, occurredOn: row.line.occurredOn, rows: [row], note: act?.note ?? null, recordedByName: act?.recordedByName ?? '', recordedAt: act?.recordedAt ?? '' })
  }
  return grouped.map(act => ({ ...act, rows: inOrderOfDoing(act.rows) }))
}

/** Acts stand newest first, but the lines of one act in the order in which they were done. */
function inOrderOfDoing(rows: readonly LedgerRow[]): LedgerRow[] {
  return [...rows].reverse()
}

function wordOf(line: MovementView, vesselId: string, had: number): string {
  if (line.kind === 'in') return had > 0 ? 'Refill' : 'Fill'
  if (line.kind === 'move') return line.toVesselId === vesselId ? 'Moved in' : 'Moved out'
  return LINE_WORDS[line.kind]
}

function whatOf(line: MovementView, vesselId: string): string {
  const { brew, lot, reason, lossLitres } = line
  if (brew) return `${brew.code}, brewed ${plainDate(brew.brewedOn)}`
  if (line.kind === 'draw') return lot === null ? '' : `to run ${lot}`
  if (line.kind === 'move') {
    const lost = lossLitres ? `, ${litreWords(lossLitres)} lost on the way` : ''
    return line.toVesselId === vesselId ? `from ${line.vesselName}${lost}` : `to ${line.toVesselName}${lost}`
  }
  return reason ?? ''
}

/** Whether a line is meant by a filter of kind and text. */
export function matches({ line, word, what }: LedgerRow, kind: MovementKind | '', text: string): boolean {
  if (kind !== '' && line.kind !== kind) return false
  const wanted = text.trim().toLowerCase()
  return wanted === '' || [word, what, line.note, line.occurredOn, line.reversal?.reason].some(words => words?.toLowerCase().includes(wanted))
}
