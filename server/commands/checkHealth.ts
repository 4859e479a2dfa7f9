import type { Health } from '#shared/schemas/health'
import { withoutBrewery } from '#server/database/door'
import type { Database } from '#server/database/client'
import { migrationsApplied } from '#server/database/queries/migrations'
import { anyBrewery } from '#server/database/queries/people'
import journal from '../database/migrations/meta/_journal.json'

/** How the installation is: whether the database answers, is migrated, and, where the demo is asked for, holds it. */
export async function checkHealth(database: Database, demoWanted: boolean): Promise<Health> {
  const parts = { mailQueue: null, lastDerivedAt: null }
  try {
    return await withoutBrewery(database, async (tx) => {
      const migrated = await migrationsApplied(tx) >= journal.entries.length
      const loaded = migrated && (!demoWanted || await anyBrewery(tx))
      return { status: loaded ? 'ok' : 'starting', database: 'ok', migrations: migrated ? 'ok' : 'pending', ...parts }
    })
  }
  catch {
    return { status: 'failing', database: 'failing', migrations: null, ...parts }
  }
}
