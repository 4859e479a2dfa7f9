import { migrateDatabase } from '../../server/database/migrate'
import { loadDemo } from '../../dev/loadDemo'
import { startTestCluster } from '../../scripts/lib/testCluster'
import { runBuilt } from '../support/built'
import { DEMO_MORNING } from '../support/demoMorning'
import { onDatabase } from '../support/addresses'
import { signedIn } from '../support/visitor'
import { firstLoadOf } from './firstLoad'
import { benchSignIn } from './signIn'
import { benchVessels } from './vessels'

/*
 * What is held to a figure, measured in one run on one machine: ratios against a floor that stands beside them, and counts.
 * Nothing passes or fails here: a slow day of the machine is no fault of the code. Read the figures.
 */

const { cluster, addresses, remove } = await startTestCluster()
try {
  await cluster.createDatabase('bench')
  await migrateDatabase(onDatabase(addresses.owner, 'bench'))
  const databaseUrl = onDatabase(addresses.app, 'bench')
  await loadDemo({ databaseUrl, now: new Date(DEMO_MORNING) })
  const server = await runBuilt({ databaseUrl, now: DEMO_MORNING, env: { UNDERCROFT_LOG: 'info' } })
  try {
    const owner = await signedIn(server.origin, 'owner@sallowmere.example')

    const { kB, files } = firstLoadOf((await owner.get('/cellar', { accept: 'text/html' })).text)
    line('First load of Cellar, JavaScript, gzipped', `${kB.toFixed(1)} kB in ${files.length} files`, 'at most 100 kB')

    const rate = await benchVessels({ origin: server.origin, cookie: owner.cookie ?? '' }, onDatabase(addresses.superuser, 'bench'))
    line('GET /api/vessels ÷ bare Nitro and pg, requests a second', `${rate.median.toFixed(2)} (${rate.lowest.toFixed(2)} to ${rate.highest.toFixed(2)})`, '0.4 or more')

    const known = await benchSignIn(server.origin)
    line('Sign-in, unknown address ÷ known one, median time', known.toFixed(3), '0.95 to 1.05')
  }
  finally {
    await server.stop()
  }
}
finally {
  await remove()
}

function line(what: string, measured: string, wanted: string): void {
  console.log(`${what}: ${measured}   [${wanted}]`)
}
