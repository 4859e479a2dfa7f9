import type { Database } from '#server/database/client'
import { withoutBrewery } from '#server/database/door'
import { endSession } from './session'

/** End the session that a browser carries; for one that carries none there is nothing to do. */
export async function signOut(database: Database, sessionHash: string | null): Promise<void> {
  if (sessionHash !== null) await withoutBrewery(database, tx => endSession(tx, sessionHash))
}
