import { and, asc, eq, getTableColumns, max, sql } from 'drizzle-orm'
import { WALKING_ORDER_MAX } from '#shared/cellar/vessel'
import { preparedOnce, type Tx } from '../client'
import { beers, vessels } from '../schema'

export type VesselRow = typeof vessels.$inferSelect

/** A vessel with the beer it is meant for. */
export type VesselWithBeer = VesselRow & { beerCode: string | null, beerName: string | null }

const inWalkingOrder = preparedOnce(tx => tx.select({ ...getTableColumns(vessels), beerCode: beers.code, beerName: beers.name }).from(vessels)
  .leftJoin(beers, and(eq(beers.breweryId, vessels.breweryId), eq(beers.id, vessels.beerId)))
  .where(eq(vessels.breweryId, sql.placeholder('breweryId')))
  .orderBy(asc(vessels.walkingOrder), asc(vessels.name))
  .prepare('vessels_in_walking_order'))

/** All vessels of a brewery, in walking order. */
export function vesselsInWalkingOrder(tx: Tx, breweryId: string): Promise<VesselWithBeer[]> {
  return inWalkingOrder(tx).execute({ breweryId })
}

/** One vessel, or undefined if the brewery has none of that id. */
export async function vesselById(tx: Tx, breweryId: string, id: string): Promise<VesselRow | undefined> {
  const [row] = await tx.select().from(vessels).where(and(eq(vessels.breweryId, breweryId), eq(vessels.id, id)))
  return row
}

/** The same, held until the transaction ends, so that nobody changes it between the look and the deed. */
export async function lockedVesselById(tx: Tx, breweryId: string, id: string): Promise<VesselRow | undefined> {
  const [row] = await tx.select().from(vessels).where(and(eq(vessels.breweryId, breweryId), eq(vessels.id, id))).for('no key update')
  return row
}

/** The place behind the last vessel on the walk. */
export async function nextPlaceOnTheWalk(tx: Tx, breweryId: string): Promise<number> {
  const [row] = await tx.select({ last: max(vessels.walkingOrder) }).from(vessels).where(eq(vessels.breweryId, breweryId))
  return Math.min((row?.last ?? 0) + 1, WALKING_ORDER_MAX)
}
