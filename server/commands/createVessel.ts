import { usuallyWooden } from '#shared/cellar/vessel'
import type { VesselCreate, VesselView } from '#shared/schemas/vessel'
import { fieldFault, Fault } from '#shared/types/fault'
import { breaksUnique, savepoint } from '#server/database/door'
import { nextPlaceOnTheWalk, vesselById, type VesselRow } from '#server/database/queries/vessels'
import { vessels } from '#server/database/schema/index'
import { audit } from './audit'
import { readVessel } from './readVessel'
import type { Work } from './work'

/**
 * Set up a vessel. The sender makes the id: the same id with the same content again finds the vessel that the first one
 * made (`made` is false), with other content it is refused.
 */
export async function createVessel(work: Work, input: VesselCreate, beerId: string | null = null): Promise<{ vessel: VesselView, made: boolean }> {
  const { tx, brewery } = work
  const known = await vesselById(tx, brewery.id, input.id)
  if (known) return replay(work, known, input)
  const row = {
    breweryId: brewery.id,
    id: input.id,
    name: input.name,
    kind: input.kind,
    workingLitres: input.workingLitres,
    wood: input.wood ?? usuallyWooden(input.kind),
    walkingOrder: input.walkingOrder ?? await nextPlaceOnTheWalk(tx, brewery.id),
    beerId,
    createdAt: work.now,
  }
  try {
    const [vessel] = await savepoint(tx, () => tx.insert(vessels).values(row).returning())
    if (!vessel) throw new Error('an insert gave no row back')
    await audit(work, { action: 'vessel.created', subject: { kind: 'vessel', id: vessel.id }, detail: { ...input } })
    return { vessel: await readVessel(work, vessel.id), made: true }
  }
  catch (error) {
    // Two at once with one id: the second finds what the first has just kept.
    if (breaksUnique(error, 'vessels_pkey') || breaksUnique(error, 'vessels_name_key')) {
      const first = await vesselById(tx, brewery.id, input.id)
      if (first) return replay(work, first, input)
      throw nameTaken(input.name)
    }
    throw error
  }
}

/** The fault of a name that another vessel of the brewery bears. */
export function nameTaken(name: string): Fault {
  return fieldFault('name', `A vessel named ${name} stands here already. Take another name.`)
}

async function replay(work: Work, known: VesselRow, input: VesselCreate): Promise<{ vessel: VesselView, made: boolean }> {
  const same = known.name === input.name && known.kind === input.kind && known.workingLitres === input.workingLitres
    && (input.wood === undefined || known.wood === input.wood)
    && (input.walkingOrder === undefined || known.walkingOrder === input.walkingOrder)
  const vessel = await readVessel(work, known.id)
  if (!same) throw new Fault('sameIdOtherContent', 'A vessel with this id is kept already, and it is another one.', { current: vessel })
  return { vessel, made: false }
}
