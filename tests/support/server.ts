import { freshSetUpCode } from '../../server/commands/freshSetUpCode'
import { runBuilt, type BuiltServer } from './built'
import { DEMO_MORNING } from './demoMorning'
import { freshDatabase, type TestDatabase } from './database'

export interface TestServer extends BuiltServer {
  db: TestDatabase
  /** The one-time code of an empty installation. */
  setUpCode: string | undefined
}

/** The built server on a database of its own, or on `db`. Without `demo` the installation is empty. */
export async function startServer({ demo = true, now = DEMO_MORNING, db, env }: { demo?: boolean, now?: string, db?: TestDatabase, env?: Record<string, string> } = {}): Promise<TestServer> {
  const own = db ?? await freshDatabase({ demo })
  const code = demo ? null : await freshSetUpCode({ databaseUrl: own.urls.app, now: new Date(now) })
  const server = await runBuilt({ databaseUrl: own.urls.app, now, env })
  return {
    ...server,
    db: own,
    setUpCode: code?.code,
    stop: async () => {
      await server.stop()
      if (!db) await own.drop()
    },
  }
}
