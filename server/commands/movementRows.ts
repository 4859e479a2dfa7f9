import { PLACE_IN_DAY } from '#shared/cellar/movement'
import type { ActInput, BrewRef } from '#shared/schemas/ledger'
import type { movements } from '#server/database/schema/index'
import { brewsByCode, type KnownBrew, type NamedBrew } from './brewsByCode'
import type { Work } from './work'

type NewMovement = Required<typeof movements.$inferInsert>

/** The rows of an act's movements, in their order. Brews that are named for the first time are made. */
export async function movementRowsOf(work: Work, { id: actId, movements: inputs }: ActInput): Promise<{ rows: NewMovement[], brews: KnownBrew[] }> {
  const named = inputs.flatMap(input => input.kind === 'in' && isNamed(input.brew) ? [input.brew] : [])
  const known = await brewsByCode(work, named)
  const rows = inputs.map((input, position): NewMovement => {
    const { id, kind, vesselId, litres, occurredOn, placeInDay = PLACE_IN_DAY[kind], method = null, note = null } = input
    return {
      breweryId: work.brewery.id, id, actId, position, kind, vesselId, litres, occurredOn, placeInDay, method, note,
      brewId: input.kind === 'in' ? brewIdOf(input.brew, known) : null,
      lot: input.kind === 'draw' ? input.lot ?? null : null,
      toVesselId: input.kind === 'move' ? input.toVesselId : null,
      lossLitres: input.kind === 'move' ? input.lossLitres ?? 0 : null,
      reason: input.kind === 'loss' ? input.reason : null,
    }
  })
  return { rows, brews: [...known.values()] }
}

function isNamed(brew: BrewRef): brew is NamedBrew {
  return 'code' in brew
}

function brewIdOf(brew: BrewRef, known: ReadonlyMap<string, KnownBrew>): string {
  if (!isNamed(brew)) return brew.id
  const made = known.get(brew.code)
  if (made === undefined) throw new Error('a brew that was just made is not there')
  return made.id
}
