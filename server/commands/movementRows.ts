import { PLACE_IN_DAY } from '#shared/cellar/movement'
import type { ActInput, BrewRef } from '#shared/schemas/ledger'
import type { movements } from '#server/database/schema/index'
import { brewsByCode, type NamedBrew } from './brewsByCode'
import type { Work } from './work'

type NewMovement = typeof movements.$inferInsert

/** The rows of an act's movements, in their order. Brews that are named for the first time are made. */
export async function movementRowsOf(work: Work, { id: actId, movements: inputs }: ActInput): Promise<NewMovement[]> {
  const named = inputs.flatMap(input => input.kind === 'in' && isNamed(input.brew) ? [input.brew] : [])
  const ids = await brewsByCode(work, named)
  return inputs.map((input, position): NewMovement => {
    const { id, kind, vesselId, litres, occurredOn, placeInDay = PLACE_IN_DAY[kind], method = null, note = null } = input
    return {
      breweryId: work.brewery.id, id, actId, position, kind, vesselId, litres, occurredOn, placeInDay, method, note,
      brewId: input.kind === 'in' ? brewIdOf(input.brew, ids) : null,
      lot: input.kind === 'draw' ? input.lot ?? null : null,
      toVesselId: input.kind === 'move' ? input.toVesselId : null,
      lossLitres: input.kind === 'move' ? input.lossLitres ?? 0 : null,
      reason: input.kind === 'loss' ? input.reason : null,
    }
  })
}

function isNamed(brew: BrewRef): brew is NamedBrew {
  return 'code' in brew
}

function brewIdOf(brew: BrewRef, ids: ReadonlyMap<string, string>): string {
  if (!isNamed(brew)) return brew.id
  const id = ids.get(brew.code)
  if (id === undefined) throw new Error('a brew that was just made is not there')
  return id
}
