import type { Settings } from '../../server/utils/settings'
import { migrateDatabase } from '../../server/database/migrate'
import { freshSetUpCode } from '../../server/commands/freshSetUpCode'
import type { Opening } from './announce'

/** Bring the database up to this version, then load the demo into it or, where it is empty, make the code that opens the set-up form. */
export async function openDatabase(options: { databaseUrl: string, ownerUrl: string | undefined, demo: Settings['demo'], now: Date, signal: AbortSignal }): Promise<Opening> {
  const { databaseUrl, ownerUrl, demo, now, signal } = options
  if (ownerUrl === undefined) console.log('DATABASE_OWNER_URL is not given: the database is taken as it is, without migrations.')
  else await migrateDatabase(ownerUrl)
  signal.throwIfAborted()

  if (demo === 'none') return await freshSetUpCode({ databaseUrl, now }) ?? undefined
  const { loadDemo, DEMO_PASSWORD } = await import('../../dev/loadDemo')
  const { signIns } = await loadDemo({ databaseUrl, now })
  return { signIns, password: DEMO_PASSWORD }
}
