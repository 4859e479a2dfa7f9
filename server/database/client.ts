import { drizzle, type NodePgDatabase } from 'drizzle-orm/node-postgres'
import pg from 'pg'
import * as schema from './schema'

/**
 * An open transaction, as commands and queries use it. Only the doors in `door.ts` make one. It begins and ends there,
 * so it has no `transaction()` of its own; `savepoint()` is for a step that may fail by itself.
 */
export type Tx = Omit<NodePgDatabase<typeof schema>, 'transaction'> & { readonly $client: pg.PoolClient }

/** The way to PostgreSQL of one process. Nobody but the doors takes a client out of it. */
export interface Database {
  readonly pool: pg.Pool
  close(): Promise<void>
}

export interface DatabaseOptions {
  connections?: number
  /** Told of a connection that broke while nobody used it; the pool makes a new one. */
  onIdleError?: (error: Error) => void
}

/** Open the application's way to PostgreSQL. Nothing is connected before it is needed. */
export function openDatabase(url: string, { connections = 10, onIdleError = () => {} }: DatabaseOptions = {}): Database {
  const pool = new pg.Pool({
    connectionString: url,
    max: connections,
    connectionTimeoutMillis: 5_000,
    idleTimeoutMillis: 60_000,
    // A statement that takes longer than this holds up everybody else.
    statement_timeout: 15_000,
    lock_timeout: 5_000,
    // A long file is read while its transaction waits for it.
    idle_in_transaction_session_timeout: 120_000,
    application_name: 'undercroft',
    // What is asked together goes out together: a transaction is begun and its brewery opened in one round trip.
    pipeline: true,
  })
  pool.on('error', onIdleError)
  // A connection that breaks while it is lent out says so to whoever uses it; without a listener it would end the process as well.
  pool.on('connect', client => client.on('error', onIdleError))
  return { pool, close: () => pool.end() }
}

const orms = new WeakMap<pg.PoolClient, Tx>()

/** The query builder of one connection. Kept with it, so that its prepared statements are. */
export function ormOf(client: pg.PoolClient): Tx {
  let orm = orms.get(client)
  if (!orm) {
    orm = drizzle(client, { schema, casing: 'snake_case' })
    orms.set(client, orm)
  }
  return orm
}

/**
 * A query of a hot path: built and planned once a connection.
 *
 * @param build says the query, with `sql.placeholder` for what changes, and prepares it under a name of its own
 * @returns what gives the query for an open transaction
 */
export function preparedOnce<Query>(build: (tx: Tx) => Query): (tx: Tx) => Query {
  const kept = new WeakMap<Tx, Query>()
  return (tx) => {
    let query = kept.get(tx)
    if (query === undefined) {
      query = build(tx)
      kept.set(tx, query)
    }
    return query
  }
}
