import type { Me } from '#shared/schemas/auth'
import type { Tx } from '#server/database/client'
import { breweriesOf } from '#server/database/queries/people'
import { presentMe } from '#server/presenters/me'

/** Who is signed in, where, and what day it is there. */
export async function describeMe(tx: Tx, user: Me['user'], breweryId: string | null, now: Date): Promise<Me> {
  return presentMe(user, breweryId, await breweriesOf(tx, user.id, now), now)
}
