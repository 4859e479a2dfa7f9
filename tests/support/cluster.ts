import pg from 'pg'
import type { TestProject } from 'vitest/node'
import { migrateDatabase } from '../../server/database/migrate'
import { loadDemo } from '../../dev/loadDemo'
import { onDatabase } from './addresses'
import { DEMO_MORNING } from './demoMorning'
import { startTestCluster, type TestClusterAddresses } from '../../scripts/lib/testCluster'

declare module 'vitest' {
  interface ProvidedContext {
    cluster: TestClusterAddresses
  }
}

/**
 * One cluster for all tests that need PostgreSQL: the one that `scripts/test` has started, or one of our own. In it stand
 * two databases to be cloned: `template_empty`, migrated, and `template_demo`, with the demo in it.
 */
export default async function setup(project: TestProject): Promise<() => Promise<void>> {
  const given = process.env.UNDERCROFT_TEST_CLUSTER
  const own = given ? undefined : await startTestCluster()
  const addresses: TestClusterAddresses = own ? own.addresses : JSON.parse(given ?? '')
  await makeTemplates(addresses)
  project.provide('cluster', addresses)
  return async () => own?.remove()
}

async function makeTemplates(addresses: TestClusterAddresses): Promise<void> {
  const superuser = new pg.Client({ connectionString: addresses.superuser })
  await superuser.connect()
  try {
    // Several projects come here at once; the first makes them, the others wait and find them.
    await superuser.query('select pg_advisory_lock(1)')
    const { rows } = await superuser.query<{ datname: string }>(`select datname from pg_database where datname like 'template\\_%'`)
    const there = new Set(rows.map(row => row.datname))
    if (!there.has('template_empty')) {
      await superuser.query('create database template_empty owner undercroft_owner')
      await migrateDatabase(onDatabase(addresses.owner, 'template_empty'))
    }
    if (!there.has('template_demo')) {
      await superuser.query('create database template_demo owner undercroft_owner')
      await migrateDatabase(onDatabase(addresses.owner, 'template_demo'))
      await loadDemo({ databaseUrl: onDatabase(addresses.app, 'template_demo'), now: new Date(DEMO_MORNING) })
    }
  }
  finally {
    await superuser.end()
  }
}
