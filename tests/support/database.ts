import { randomBytes } from 'node:crypto'
import pg from 'pg'
import { inject } from 'vitest'
import { openDatabase, type Database } from '../../server/database/client'
import { onDatabase } from './addresses'

export interface TestDatabase {
  name: string
  /** As the application's role. */
  database: Database
  urls: { superuser: string, owner: string, app: string, backup: string }
  /** Ask as the cluster's superuser, who sees past every policy. */
  asSuperuser<Row extends pg.QueryResultRow>(text: string, values?: unknown[]): Promise<Row[]>
  drop(): Promise<void>
}

/** A database of one's own: a clone of the empty one or of the demo. */
export async function freshDatabase({ demo = false, connections = 4 }: { demo?: boolean, connections?: number } = {}): Promise<TestDatabase> {
  const cluster = inject('cluster')
  const name = `test_${randomBytes(6).toString('hex')}`
  await query(cluster.superuser, `create database ${name} template ${demo ? 'template_demo' : 'template_empty'} owner undercroft_owner`)
  const urls = {
    superuser: onDatabase(cluster.superuser, name),
    owner: onDatabase(cluster.owner, name),
    app: onDatabase(cluster.app, name),
    backup: onDatabase(cluster.backup, name),
  }
  const database = openDatabase(urls.app, { connections })
  const superusers = new pg.Pool({ connectionString: urls.superuser, max: 2 })
  return {
    name,
    database,
    urls,
    asSuperuser: async <Row extends pg.QueryResultRow>(text: string, values: unknown[] = []) => (await superusers.query<Row>(text, values)).rows,
    drop: async () => {
      await database.close()
      await superusers.end()
      await query(cluster.superuser, `drop database ${name} with (force)`)
    },
  }
}

async function query(url: string, text: string): Promise<void> {
  const client = new pg.Client({ connectionString: url })
  await client.connect()
  try {
    await client.query(text)
  }
  finally {
    await client.end()
  }
}
