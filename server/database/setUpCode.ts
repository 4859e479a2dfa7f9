import { issueSetUpCode } from '#server/commands/issueSetUpCode'
import { openDatabase } from './client'
import { withoutBrewery } from './door'

export async function freshSetUpCode({ databaseUrl, now }: { databaseUrl: string, now: Date }): Promise<{ code: string, until: Date } | null> {
  const database = openDatabase(databaseUrl, { connections: 1 })
  try {
    return await withoutBrewery(database, tx => issueSetUpCode(tx, now))
  }
  finally {
    await database.close()
  }
}
