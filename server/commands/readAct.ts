import type { ActView } from '#shared/schemas/ledger'
import { Fault } from '#shared/types/fault'
import { actById, brewsOldestFirst, reversalsOf } from '#server/database/queries/ledger'
import { vesselsInWalkingOrder } from '#server/database/queries/vessels'
import { presentAct } from '#server/presenters/ledger'
import type { Work } from './work'

/** One act with its movements, and which of them were struck out. */
export async function readAct({ tx, brewery }: Work, id: string): Promise<ActView> {
  const known = await actById(tx, brewery.id, id)
  if (!known) throw new Fault('notFound', 'There is no such act.')
  const vessels = await vesselsInWalkingOrder(tx, brewery.id)
  const brews = new Map((await brewsOldestFirst(tx, brewery.id)).map(brew => [brew.id, brew]))
  return presentAct(known, { vessels, brews }, await reversalsOf(tx, brewery.id, known.movements.map(movement => movement.id)))
}
