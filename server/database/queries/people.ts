import { and, asc, eq, isNull } from 'drizzle-orm'
import type { Role } from '#shared/abilities'
import { civilDateIn } from '#shared/cellar/civilDate'
import type { Tx } from '../client'
import { breweries, memberships, users } from '../schema'

export type UserRow = typeof users.$inferSelect

export async function userByEmail(tx: Tx, email: string): Promise<UserRow | undefined> {
  const [row] = await tx.select().from(users).where(eq(users.email, email))
  return row
}

export interface OwnBrewery {
  id: string
  name: string
  timeZone: string
  role: Role
}

/** The breweries in whose crew a person is today, by name. The person must be open: see `openPerson()`. */
export async function breweriesOf(tx: Tx, userId: string, now: Date): Promise<OwnBrewery[]> {
  const rows = await tx.select({ id: breweries.id, name: breweries.name, timeZone: breweries.timeZone, role: memberships.role, accessUntil: memberships.accessUntil })
    .from(memberships).innerJoin(breweries, eq(breweries.id, memberships.breweryId))
    .where(and(eq(memberships.userId, userId), isNull(memberships.endedAt)))
    .orderBy(asc(breweries.name), asc(breweries.id))
  return rows
    .filter(row => mayStillEnter(row.accessUntil, row.timeZone, now))
    .map(({ id, name, timeZone, role }) => ({ id, name, timeZone, role }))
}

/** Whether access that is given until a day still holds: from the next day on, by the brewery's calendar, it does not. */
export function mayStillEnter(accessUntil: string | null, timeZone: string, now: Date): boolean {
  return accessUntil === null || civilDateIn(timeZone, now.getTime()) <= accessUntil
}

/** Whether any brewery is here at all. */
export async function anyBrewery(tx: Tx): Promise<boolean> {
  const rows = await tx.select({ id: breweries.id }).from(breweries).limit(1)
  return rows.length > 0
}
