import { PLACE_IN_DAY } from '#shared/cellar/movement'
import type { ActInput, MovementInput } from '#shared/schemas/ledger'
import { brewsOldestFirst, type ActRow, type MovementRow } from '#server/database/queries/ledger'
import type { Work } from './work'

/** Whether an act that is sent again says what was kept of it the first time. */
export async function sameAct({ tx, brewery }: Work, kept: { act: ActRow, movements: MovementRow[] }, sent: ActInput): Promise<boolean> {
  if (kept.act.note !== (sent.note ?? null) || kept.movements.length !== sent.movements.length) return false
  const brews = new Map((await brewsOldestFirst(tx, brewery.id)).map(brew => [brew.id, brew]))
  return kept.movements.every((row, at) => {
    const input = sent.movements[at]
    return input !== undefined && sameMovement(row, input) && sameBrew(row, input, brews)
  })
}

function sameMovement(row: MovementRow, input: MovementInput): boolean {
  const { placeInDay = PLACE_IN_DAY[input.kind] } = input
  return row.id === input.id && row.kind === input.kind && row.vesselId === input.vesselId && row.litres === input.litres
    && row.occurredOn === input.occurredOn && row.placeInDay === placeInDay
    && row.method === (input.method ?? null) && row.note === (input.note ?? null)
    && (input.kind !== 'draw' || row.lot === (input.lot ?? null))
    && (input.kind !== 'move' || (row.toVesselId === input.toVesselId && row.lossLitres === (input.lossLitres ?? 0)))
    && (input.kind !== 'loss' || row.reason === input.reason)
}

function sameBrew(row: MovementRow, input: MovementInput, brews: ReadonlyMap<string, { code: string, brewedOn: string }>): boolean {
  if (input.kind !== 'in') return true
  if ('id' in input.brew) return row.brewId === input.brew.id
  const kept = brews.get(row.brewId ?? '')
  return kept?.code === input.brew.code && kept.brewedOn === input.brew.brewedOn
}
