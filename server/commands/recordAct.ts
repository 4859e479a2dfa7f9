import type { ActInput, ActRecorded, MovementInput } from '#shared/schemas/ledger'
import { Fault } from '#shared/types/fault'
import { breaksUnique, savepoint } from '#server/database/door'
import { actById, beersByCode } from '#server/database/queries/ledger'
import { acts, movements } from '#server/database/schema/index'
import { presentAct } from '#server/presenters/ledger'
import { audit } from './audit'
import { sameAct } from './actContent'
import { requireSound } from './actRules'
import { readCellarState, withLines } from './cellarState'
import { movementRowsOf } from './movementRows'
import { whatChanged } from './whatChanged'
import type { Work } from './work'

/**
 * Record movements that belong together: all are kept or none. The sender makes the ids: the same act again is found
 * (`made` is false), another one under its id is refused. More than was there may be drawn, and more than fits may be
 * filled in: the ledger keeps what it is told, and what is worked out from it carries the mark.
 */
export async function recordAct(work: Work, input: ActInput): Promise<{ act: ActRecorded, made: boolean }> {
  const { tx, brewery, person, now } = work
  const [known, before] = await Promise.all([actById(tx, brewery.id, input.id), readCellarState(tx, brewery.id)])
  if (known) return replayed(work, input)
  // Asked for only by an act that names a beer, which few do.
  const beers = input.movements.some(namesBeer) ? await beersByCode(tx, brewery.id) : []
  requireSound(input, before, beers.map(beer => beer.code), work.today)
  const act = { breweryId: brewery.id, id: input.id, note: input.note ?? null, recordedAt: now, recordedBy: person.id }
  try {
    const { rows, brews } = await savepoint(tx, async () => {
      await tx.insert(acts).values(act)
      const made = await movementRowsOf(work, input)
      await tx.insert(movements).values(made.rows)
      return made
    })
    await audit(work, { action: 'act.recorded', subject: { kind: 'act', id: input.id } })
    const after = withLines(before, rows, brews)
    const view = presentAct({ act: { ...act, recordedByName: person.name }, movements: rows }, after, [])
    return { act: { ...view, changed: whatChanged(before, after, work.today) }, made: true }
  }
  catch (error) {
    // Two tablets with one act: the second finds what the first has just kept.
    if (breaksUnique(error, 'acts_pkey')) return replayed(work, input)
    if (breaksUnique(error, 'movements_pkey')) throw new Fault('sameIdOtherContent', 'A movement with one of these ids is kept already, in another act.')
    throw error
  }
}

function namesBeer(movement: MovementInput): boolean {
  return movement.kind === 'in' && 'beerCode' in movement.brew && movement.brew.beerCode !== undefined
}

async function replayed(work: Work, input: ActInput): Promise<{ act: ActRecorded, made: boolean }> {
  const { tx, brewery } = work
  const known = await actById(tx, brewery.id, input.id)
  if (!known || !await sameAct(work, known, input)) throw new Fault('sameIdOtherContent', 'An act with this id is kept already, and it is another one.')
  return { act: { ...presentAct(known, await readCellarState(tx, brewery.id), []), changed: [] }, made: false }
}
