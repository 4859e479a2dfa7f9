import { eq } from 'drizzle-orm'
import type { Me } from '#shared/schemas/auth'
import { Fault } from '#shared/types/fault'
import type { Tx } from '#server/database/client'
import { breweriesOf } from '#server/database/queries/people'
import { sessions } from '#server/database/schema/index'
import { presentMe } from '#server/presenters/me'

/** Go on in another brewery of one's own. */
export async function chooseBrewery(tx: Tx, user: Me['user'], sessionHash: string, breweryId: string, now: Date): Promise<Me> {
  const breweries = await breweriesOf(tx, user.id, now)
  if (!breweries.some(brewery => brewery.id === breweryId)) throw new Fault('notFound', 'There is no such brewery.')
  await tx.update(sessions).set({ breweryId }).where(eq(sessions.tokenHash, sessionHash))
  return presentMe(user, breweryId, breweries, now)
}
