import { fileURLToPath } from 'node:url'
import { drizzle } from 'drizzle-orm/node-postgres'
import { migrate } from 'drizzle-orm/node-postgres/migrator'
import pg from 'pg'

const FOLDER = fileURLToPath(new URL('./migrations', import.meta.url))

/** One number for all that migrate the same database: the second waits for the first, and finds nothing left to do. */
const LOCK = 7_306_121

/** Bring the database up to the newest schema. Run as the owner, before the server starts; safe to run from several places at once. */
export async function migrateDatabase(ownerUrl: string): Promise<void> {
  const client = new pg.Client({ connectionString: ownerUrl, application_name: 'undercroft migrate' })
  await client.connect()
  try {
    await client.query('select pg_advisory_lock($1)', [LOCK])
    await migrate(drizzle(client), { migrationsFolder: FOLDER })
  }
  finally {
    await client.end()
  }
}
