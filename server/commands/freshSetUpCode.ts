import { openDatabase } from '#server/database/client'
import { withoutBrewery } from '#server/database/door'
import { issueSetUpCode } from './issueSetUpCode'

/** The one-time code that a start prints, for a script that has no database open: null where a brewery is already. */
export async function freshSetUpCode({ databaseUrl, now }: { databaseUrl: string, now: Date }): Promise<{ code: string, until: Date } | null> {
  const database = openDatabase(databaseUrl, { connections: 1 })
  try {
    return await withoutBrewery(database, tx => issueSetUpCode(tx, now))
  }
  finally {
    await database.close()
  }
}
