import { and, eq, or } from 'drizzle-orm'
import { v7 as newId } from 'uuid'
import type { VesselEventKind } from '#shared/cellar/vesselEvent'
import type { VesselEventView } from '#shared/schemas/vesselEvent'
import { fieldFault, Fault } from '#shared/types/fault'
import { eventsOfVessel } from '#server/database/queries/vesselEvents'
import { vesselById } from '#server/database/queries/vessels'
import { movements, vesselEvents } from '#server/database/schema/index'
import { presentVesselEvent } from '#server/presenters/vesselEvent'
import { audit } from './audit'
import { noSuchVessel } from './readVessel'
import type { Work } from './work'

export interface NewVesselEvent {
  id: string
  kind: VesselEventKind
  occurredOn: string
  reason?: string
}

/** Record what befell a vessel. The same id with the same content again finds the first (`made` is false). */
export async function recordVesselEvent(work: Work, vesselId: string, input: NewVesselEvent): Promise<{ event: VesselEventView, made: boolean }> {
  const { tx, brewery, person, now, today } = work
  if (!await vesselById(tx, brewery.id, vesselId)) throw noSuchVessel()
  if (input.occurredOn > today) throw fieldFault('occurredOn', 'This day has not come yet.')
  const rows = await tx.insert(vesselEvents).values({
    breweryId: brewery.id, vesselId, id: input.id, kind: input.kind, occurredOn: input.occurredOn, reason: input.reason ?? null, recordedAt: now, recordedBy: person.id,
  }).onConflictDoNothing({ target: [vesselEvents.breweryId, vesselEvents.id] }).returning({ id: vesselEvents.id })
  const kept = (await eventsOfVessel(tx, brewery.id, vesselId)).find(event => event.id === input.id)
  const same = kept && kept.kind === input.kind && kept.occurredOn === input.occurredOn && kept.reason === (input.reason ?? null)
  if (!same) throw new Fault('sameIdOtherContent', 'Something with this id is kept already, and it is another.')
  const made = rows.length > 0
  if (made) await audit(work, { action: 'vessel.event', subject: { kind: 'vessel', id: vesselId }, detail: { kind: input.kind } })
  return { event: presentVesselEvent(kept), made }
}

/** Keep that a vessel came to hold more or less. */
export async function recordResize({ tx, brewery, person, now }: Work, vesselId: string, occurredOn: string, fromLitres: number, toLitres: number): Promise<void> {
  await tx.insert(vesselEvents).values({ breweryId: brewery.id, vesselId, id: newId(), kind: 'resized', occurredOn, fromLitres, toLitres, recordedAt: now, recordedBy: person.id })
}

/** Whether the ledger names a vessel. */
export async function hasLines({ tx, brewery }: Work, vesselId: string): Promise<boolean> {
  const rows = await tx.select({ id: movements.id }).from(movements)
    .where(and(eq(movements.breweryId, brewery.id), or(eq(movements.vesselId, vesselId), eq(movements.toVesselId, vesselId)))).limit(1)
  return rows.length > 0
}
