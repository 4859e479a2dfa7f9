import { openDatabase, type Database } from '#server/database/client'
import { useLog } from './log'
import { settings } from './settings'

let database: Database | undefined

/** The server's way to PostgreSQL. */
export function useDatabase(): Database {
  if (!database) {
    const { databaseUrl, databaseConnections } = settings()
    if (!databaseUrl) throw new Error('DATABASE_URL is not set: the server has no database to work with.')
    database = openDatabase(databaseUrl, {
      connections: databaseConnections,
      onIdleError: error => useLog().warn({ err: error }, 'a connection to the database broke'),
    })
  }
  return database
}
