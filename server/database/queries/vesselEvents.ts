import { and, asc, eq, sql } from 'drizzle-orm'
import { preparedOnce, type Tx } from '../client'
import { users, vesselEvents } from '../schema'

export type VesselEventRow = typeof vesselEvents.$inferSelect

const inOrder = preparedOnce(tx => tx.select().from(vesselEvents)
  .where(eq(vesselEvents.breweryId, sql.placeholder('breweryId')))
  .orderBy(asc(vesselEvents.occurredOn), asc(vesselEvents.recordedAt), asc(vesselEvents.id))
  .prepare('vessel_events_in_order'))

/** All vessel events of a brewery, in the order in which they happened. */
export function vesselEventsInOrder(tx: Tx, breweryId: string): Promise<VesselEventRow[]> {
  return inOrder(tx).execute({ breweryId })
}

/** The events of one vessel, newest first, told who recorded each. */
export async function eventsOfVessel(tx: Tx, breweryId: string, vesselId: string): Promise<(VesselEventRow & { recordedByName: string })[]> {
  const rows = await tx.select({ event: vesselEvents, name: users.name }).from(vesselEvents)
    .innerJoin(users, eq(users.id, vesselEvents.recordedBy))
    .where(and(eq(vesselEvents.breweryId, breweryId), eq(vesselEvents.vesselId, vesselId)))
    .orderBy(sql`${vesselEvents.occurredOn} desc, ${vesselEvents.recordedAt} desc, ${vesselEvents.id} desc`)
  return rows.map(({ event, name }) => ({ ...event, recordedByName: name }))
}
