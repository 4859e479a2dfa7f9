import { sql, type SQL } from 'drizzle-orm'
import type { AnyPgColumn } from 'drizzle-orm/pg-core'

/** Whether an id is one of a list, told to the database as one value: a statement has room for 65,535, a ledger for more. */
export function anyOf(column: AnyPgColumn, ids: readonly string[]): SQL {
  return sql`${column} = any(${sql.param(ids)}::uuid[])`
}
