import { LOSS_REASONS, METHOD_NAMES } from '#shared/cellar/movement'
import type { LossReason, Method } from '#shared/cellar/movement'
import type { VesselLedger } from '#shared/schemas/ledger'
import type { FieldFault } from '#shared/types/problem'
import { plainNumber } from './plainNumber'

/** The acts that have a form of their own. */
export const ACT_KINDS = ['draw', 'fill', 'move', 'loss'] as const
export type ActKind = (typeof ACT_KINDS)[number]

export const ACT_WORDS: Record<ActKind, { title: string, mark: 'duty-draw' | 'duty-order' | 'duty-cascade' | 'duty-topping' }> = {
  draw: { title: 'Draw and refill', mark: 'duty-draw' },
  fill: { title: 'Fill', mark: 'duty-topping' },
  move: { title: 'Move', mark: 'duty-cascade' },
  loss: { title: 'Loss', mark: 'duty-topping' },
}

/** An act as it stands in its form: all that is typed is text until it is sent. */
export interface ActFields {
  out: string
  into: string
  occurredOn: string
  lot: string
  brewCode: string
  brewedOn: string
  toVesselId: string
  lossLitres: string
  reason: LossReason | ''
  method: Method | ''
  note: string
}
export type ActField = keyof ActFields

export const ACT_LABELS: Record<ActField, string> = {
  out: 'Out', into: 'In', occurredOn: 'Day', lot: 'Run of what goes out', brewCode: 'Brew that goes in', brewedOn: 'Brewed on',
  toVesselId: 'Into', lossLitres: 'Lost on the way', reason: 'Why', method: 'How it was measured', note: 'Note',
}

export const METHOD_WORDS: Record<Method, string> = { weighed: 'Weighed', flowMeter: 'Flow meter', dip: 'Dip', sight: 'Sight glass', guess: 'Guess' }
export const METHOD_CHOICES = METHOD_NAMES.map(value => ({ value, label: METHOD_WORDS[value] }))
const REASON_WORDS: Record<LossReason, string> = { evaporation: 'Evaporation', leak: 'Leak', lees: 'Lees', transfer: 'Transfer', dumped: 'Dumped' }
export const REASON_CHOICES = LOSS_REASONS.map(value => ({ value, label: REASON_WORDS[value] }))

export function emptyAct(today: string): ActFields {
  return { out: '', into: '', occurredOn: today, lot: '', brewCode: '', brewedOn: '', toVesselId: '', lossLitres: '', reason: '', method: '', note: '' }
}

/** The litres of a field; null while it holds none. */
export function litresOf(text: string): number | null {
  const litres = plainNumber(text)
  return typeof litres === 'number' && litres > 0 ? litres : null
}

const filled = (text: string) => text.trim() !== ''

type Line = 'draw' | 'in' | 'move' | 'loss'

/** The lines of an act, in the order in which they are sent. */
function linesOf(kind: ActKind, fields: ActFields): Line[] {
  if (kind === 'draw') return filled(fields.into) ? ['draw', 'in'] : ['draw']
  return [kind === 'fill' ? 'in' : kind]
}

/** The act as it is sent. What is no number goes as it was typed, for the answer to speak of. */
export function actBody(kind: ActKind, vesselId: string, fields: ActFields, ids: { act: string, lines: readonly string[] }): object {
  const common = { vesselId, occurredOn: fields.occurredOn, ...(fields.method === '' ? {} : { method: fields.method }) }
  const movements = linesOf(kind, fields).map((line, index) => {
    const id = ids.lines[index]
    const litres = plainNumber(line === 'in' ? fields.into : fields.out)
    switch (line) {
      case 'in': return { id, kind: line, ...common, litres, brew: { code: fields.brewCode, brewedOn: fields.brewedOn } }
      case 'draw': return { id, kind: line, ...common, litres, ...(filled(fields.lot) ? { lot: fields.lot } : {}) }
      case 'move': return { id, kind: line, ...common, litres, toVesselId: fields.toVesselId, ...(filled(fields.lossLitres) ? { lossLitres: plainNumber(fields.lossLitres) } : {}) }
      default: return { id, kind: line, ...common, litres, reason: fields.reason }
    }
  })
  return { id: ids.act, ...(filled(fields.note) ? { note: fields.note } : {}), movements }
}

/** The faults of an act at the fields of its form: `movements.1.litres` is what goes in. Each field has its first. */
export function actFaults(kind: ActKind, fields: ActFields, faults: readonly FieldFault[]): FieldFault[] {
  const lines = linesOf(kind, fields)
  return faults.map((fault) => {
    const [, index, path = ''] = /^movements\.(\d+)\.(.+)$/.exec(fault.field) ?? []
    return index === undefined ? fault : { ...fault, field: fieldOf(lines[Number(index)] ?? 'draw', path, fields) }
  })
}

function fieldOf(line: Line, path: string, fields: ActFields): string {
  if (path === 'litres') return line === 'in' ? 'into' : 'out'
  if (path === 'brew.brewedOn') return 'brewedOn'
  if (path.startsWith('brew')) return filled(fields.brewCode) ? 'brewedOn' : 'brewCode'
  return path
}

/** The litres of the last line of a kind that still stands. */
export function lastLitres({ movements }: VesselLedger, vesselId: string, kind: 'in' | 'draw' | 'move' | 'loss'): number | null {
  return movements.find(line => line.kind === kind && line.reversal === null && line.vesselId === vesselId)?.litres ?? null
}

/** What the button that keeps an act says. */
export function keepWords(kind: ActKind, fields: ActFields): string {
  const [out, into] = [litresOf(fields.out), litresOf(fields.into)]
  const told = (litres: number | null) => litres === null ? '–' : litres.toLocaleString('en-GB', { maximumFractionDigits: 3 })
  if (out === null && into === null) return 'Keep the act'
  if (kind === 'draw') return into === null ? `Keep ${told(out)} out` : `Keep ${told(out)} out, ${told(into)} in`
  if (kind === 'fill') return `Keep ${told(into)} in`
  return kind === 'move' ? `Keep ${told(out)} moved` : `Keep ${told(out)} lost`
}
