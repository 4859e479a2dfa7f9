import { and, eq, inArray } from 'drizzle-orm'
import { v7 as newId } from 'uuid'
import type { ActReversed, MovementReversed, ReverseInput } from '#shared/schemas/ledger'
import { Fault } from '#shared/types/fault'
import { actById, movementById, reversalsOf } from '#server/database/queries/ledger'
import { reversals } from '#server/database/schema/index'
import { presentReversal } from '#server/presenters/ledger'
import { audit } from './audit'
import { readCellarState } from './cellarState'
import { whatChanged } from './whatChanged'
import type { Work } from './work'

/** Strike one movement out: on every date the stack is from then on as if the line had never been. The line itself stays to be read. */
export async function reverseMovement(work: Work, movementId: string, input: ReverseInput): Promise<{ reversal: MovementReversed, made: boolean }> {
  const movement = await movementById(work.tx, work.brewery.id, movementId)
  if (!movement) throw new Fault('notFound', 'There is no such line.')
  const { struck, made } = await strikeOut(work, [movementId], input)
  const [reversal] = struck.reversals
  if (!reversal) throw new Error('a reversal that was just kept is not there')
  if (made) await audit(work, { action: 'movement.reversed', subject: { kind: 'movement', id: movementId } })
  return { reversal: { ...reversal, changed: struck.changed }, made }
}

/** Strike out every movement of an act that still stands. */
export async function reverseAct(work: Work, actId: string, input: ReverseInput): Promise<{ struck: ActReversed, made: boolean }> {
  const known = await actById(work.tx, work.brewery.id, actId)
  if (!known) throw new Fault('notFound', 'There is no such act.')
  const result = await strikeOut(work, known.movements.map(movement => movement.id), input)
  if (result.made) await audit(work, { action: 'act.reversed', subject: { kind: 'act', id: actId } })
  return result
}

async function strikeOut(work: Work, movementIds: string[], input: ReverseInput): Promise<{ struck: ActReversed, made: boolean }> {
  const { tx, brewery, person, now, today } = work
  const before = await readCellarState(tx, brewery.id)
  const already = new Set((await reversalsOf(tx, brewery.id, movementIds)).map(reversal => reversal.movementId))
  const open = movementIds.filter(id => !already.has(id))
  const [first] = open
  // The sender's id is the reversal's own where one line is struck out, and the first's where an act is.
  const rows = open.length === 0
    ? []
    : await tx.insert(reversals).values(open.map(movementId => ({
        breweryId: brewery.id, id: movementId === first ? input.id : newId(), movementId, requestId: input.id, reason: input.reason, reversedAt: now, reversedBy: person.id,
      }))).onConflictDoNothing().returning({ id: reversals.id })
  const ofRequest = await tx.select({ id: reversals.id, movementId: reversals.movementId, reason: reversals.reason }).from(reversals)
    .where(and(eq(reversals.breweryId, brewery.id), eq(reversals.requestId, input.id), inArray(reversals.movementId, movementIds)))
  if (ofRequest.length === 0 || ofRequest.some(row => row.reason !== input.reason)) {
    if (rows.length === 0 && already.size > 0) throw new Fault('alreadyDone', 'This is struck out already.')
    throw new Fault('sameIdOtherContent', 'Something with this id is kept already, and it is another.')
  }
  const struck = (await reversalsOf(tx, brewery.id, ofRequest.map(row => row.movementId))).map(presentReversal)
  const after = await readCellarState(tx, brewery.id)
  return { struck: { reversals: struck, changed: whatChanged(before, after, today) }, made: rows.length > 0 }
}
