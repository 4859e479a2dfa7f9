import { v7 as newId } from 'uuid'
import type { ActReversed, MovementReversed, ReverseInput } from '#shared/schemas/ledger'
import { Fault } from '#shared/types/fault'
import { actById, movementById, reversalsByRequest, reversalsOf, type ReversalWithName } from '#server/database/queries/ledger'
import { reversals } from '#server/database/schema/index'
import { presentReversal } from '#server/presenters/ledger'
import { audit } from './audit'
import { readCellarState } from './cellarState'
import { inParts } from './inParts'
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
  const known = await sameRequest(work, movementIds, input)
  if (known) return { struck: { reversals: known.map(presentReversal), changed: [] }, made: false }
  const before = await readCellarState(tx, brewery.id)
  const struck = new Set((await reversalsOf(tx, brewery.id, movementIds)).map(reversal => reversal.movementId))
  const open = movementIds.filter(id => !struck.has(id))
  if (open.length === 0) throw alreadyStruck()
  let made = 0
  for (const some of inParts(open)) {
    // The sender's id is the reversal's own where one line is struck out, and the first's where an act is.
    const rows = await tx.insert(reversals).values(some.map(movementId => ({
      breweryId: brewery.id, id: movementId === open[0] ? input.id : newId(), movementId, requestId: input.id, reason: input.reason, reversedAt: now, reversedBy: person.id,
    }))).onConflictDoNothing().returning({ id: reversals.id })
    made += rows.length
  }
  if (made < open.length) {
    // Somebody was quicker, with this very request or with another. In the second case nothing of ours is kept.
    const theirs = made === 0 ? await sameRequest(work, movementIds, input) : null
    if (theirs) return { struck: { reversals: theirs.map(presentReversal), changed: [] }, made: false }
    throw alreadyStruck()
  }
  const after = await readCellarState(tx, brewery.id)
  const views = (await reversalsByRequest(tx, brewery.id, input.id)).map(presentReversal)
  return { struck: { reversals: views, changed: whatChanged(before, after, today) }, made: true }
}

/** What this request struck out before, if it was sent before; refused if something else was done under its id. */
async function sameRequest({ tx, brewery }: Work, movementIds: string[], { id, reason }: ReverseInput): Promise<ReversalWithName[] | null> {
  const earlier = await reversalsByRequest(tx, brewery.id, id)
  if (earlier.length === 0) return null
  const asked = new Set(movementIds)
  const struck = await reversalsOf(tx, brewery.id, movementIds)
  const same = struck.length === movementIds.length && earlier.every(reversal => reversal.reason === reason && asked.has(reversal.movementId))
  if (!same) throw new Fault('sameIdOtherContent', 'Something with this id is kept already, and it is another.')
  return earlier
}

function alreadyStruck(): Fault {
  return new Fault('alreadyDone', 'This is struck out already.')
}
