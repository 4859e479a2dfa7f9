import { sql } from 'drizzle-orm'
import type pg from 'pg'
import type { Role } from '#shared/abilities'
import { Fault } from '#shared/types/fault'
import { ormOf, type Database, type Tx } from './client'

/** Whose session a request carries, as the database tells it at the start of the transaction. */
export interface Entered {
  user: { id: string, name: string, email: string }
  /** Null while a person of several breweries has not chosen, or is no longer in the crew of the chosen one. */
  member: { breweryId: string, breweryName: string, timeZone: string, role: Role, accessUntil: string | null } | null
}

/**
 * The only way to a brewery's rows: one transaction in which the database shows and takes rows of this brewery alone.
 * Ends with everything kept, or, when `run` throws, with nothing.
 */
export function withBrewery<T>(database: Database, who: { breweryId: string, personId?: string }, run: (tx: Tx) => Promise<T>): Promise<T> {
  return transaction(database, client => client.query(OPEN, [who.breweryId, who.personId ?? '']), run)
}

const OPEN = `select set_config('undercroft.brewery', $1, true), set_config('undercroft.person', $2, true)`

/**
 * The same door for a request: the session says for which brewery it opens. `entered` is null for a session that is
 * none or over; then no brewery is open.
 */
export function withSession<T>(database: Database, sessionHash: string, now: Date, run: (entered: Entered | null, tx: Tx) => Promise<T>): Promise<T> {
  return transaction(database, client => enter(client, sessionHash, now), (tx, entered) => run(entered, tx))
}

/** One transaction over the tables that belong to no brewery: people, sessions, tokens, attempts, breweries. No tenant row is seen in it. */
export function withoutBrewery<T>(database: Database, run: (tx: Tx) => Promise<T>): Promise<T> {
  return transaction(database, () => null, run)
}

/** Bring a person's own memberships into view of an open transaction. */
export async function openPerson(tx: Tx, personId: string): Promise<void> {
  await tx.execute(sql`select set_config('undercroft.person', ${personId}, true)`)
}

/** Go on in an open transaction for a brewery that was made, or chosen, in it. */
export async function openBrewery(tx: Tx, breweryId: string): Promise<void> {
  await tx.execute(sql`select set_config('undercroft.brewery', ${breweryId}, true)`)
}

/** Run a step that may break a constraint without ending the whole transaction: what it did is taken back, what came before stays. */
export async function savepoint<T>(tx: Tx, run: () => Promise<T>): Promise<T> {
  await tx.execute(sql`savepoint step`)
  try {
    const result = await run()
    await tx.execute(sql`release savepoint step`)
    return result
  }
  catch (error) {
    await tx.execute(sql`rollback to savepoint step`)
    throw error
  }
}

interface EnteredRow {
  user_id: string
  user_name: string
  user_email: string
  brewery_id: string | null
  brewery_name: string | null
  time_zone: string | null
  role: Role | null
  access_until: string | null
}

// By hand and by name, so that the statement is planned once a connection.
async function enter(client: pg.PoolClient, sessionHash: string, now: Date): Promise<Entered | null> {
  const { rows: [row] } = await client.query<EnteredRow>({
    name: 'enter_session',
    text: 'select user_id, user_name, user_email, brewery_id, brewery_name, time_zone, role, access_until::text from enter_session($1, $2)',
    values: [sessionHash, now],
  })
  if (!row) return null
  const { user_id: id, user_name: name, user_email: email, brewery_id: breweryId, brewery_name: breweryName, time_zone: timeZone, role } = row
  const member = breweryId !== null && breweryName !== null && timeZone !== null && role !== null
    ? { breweryId, breweryName, timeZone, role, accessUntil: row.access_until }
    : null
  return { user: { id, name, email }, member }
}

/** @param open the statement that goes out together with `begin`, and inside it */
async function transaction<Opened, T>(database: Database, open: (client: pg.PoolClient) => Opened, run: (tx: Tx, opened: Awaited<Opened>) => Promise<T>): Promise<T> {
  const client = await connect(database)
  let broken = false
  try {
    const [, opened] = await Promise.all([client.query('begin'), open(client)])
    const result = await run(ormOf(client), opened)
    await client.query('commit')
    return result
  }
  catch (error) {
    // A connection that cannot even roll back is thrown away: nothing of this brewery may stay on it.
    broken = !await rolledBack(client)
    throw unavailable(error) ? new Fault('unavailable', 'The database does not answer. Try again in a moment.', { retryAfterSeconds: 5 }) : error
  }
  finally {
    client.release(broken)
  }
}

async function rolledBack(client: pg.PoolClient): Promise<boolean> {
  try {
    await client.query('rollback')
    return true
  }
  catch {
    return false
  }
}

async function connect(database: Database): Promise<pg.PoolClient> {
  try {
    return await database.pool.connect()
  }
  catch {
    throw new Fault('unavailable', 'The database does not answer. Try again in a moment.', { retryAfterSeconds: 5 })
  }
}

// Connections, resources, interventions (a statement that took too long among them), rollbacks and locks of PostgreSQL, and what a socket says.
const PASSING = /^(08|53|57|40|55P03)|^(ECONNREFUSED|ECONNRESET|EPIPE|ETIMEDOUT|ENOTFOUND)$/
const PROTOCOL_VIOLATION = '08P01'

/** Whether an error says that the server is away, shutting down or overloaded, rather than that something is wrong with the statement. */
function unavailable(error: unknown): boolean {
  const code = databaseCode(error)
  if (code !== undefined) return PASSING.test(code) && code !== PROTOCOL_VIOLATION
  // What the driver says of a connection that broke bears no code.
  if (!(error instanceof Error)) return false
  return /^Connection terminated|connection error/.test(error.message) || unavailable(error.cause)
}

/** The code of PostgreSQL or of the socket behind an error, also where the query builder has wrapped it. */
export function databaseCode(error: unknown): string | undefined {
  if (!(error instanceof Error)) return undefined
  if ('code' in error && typeof error.code === 'string') return error.code
  return databaseCode(error.cause)
}

/** Whether an error says that a row would break this unique key. */
export function breaksUnique(error: unknown, constraint: string): boolean {
  if (!(error instanceof Error)) return false
  if ('code' in error && error.code === '23505' && 'constraint' in error) return error.constraint === constraint
  return breaksUnique(error.cause, constraint)
}
