import { sql } from 'drizzle-orm'
import type { Tx } from '../client'
import { databaseCode, savepoint } from '../door'

const NO_SUCH_SCHEMA = '3F000'
const NO_SUCH_TABLE = '42P01'

/** How many migrations the database has had; nought for one that has had none. */
export async function migrationsApplied(tx: Tx): Promise<number> {
  try {
    const { rows: [row] } = await savepoint(tx, () => tx.execute<{ applied: number }>(sql`select count(*)::int as applied from drizzle.__drizzle_migrations`))
    return row?.applied ?? 0
  }
  catch (error) {
    const code = databaseCode(error)
    if (code === NO_SUCH_SCHEMA || code === NO_SUCH_TABLE) return 0
    throw error
  }
}
