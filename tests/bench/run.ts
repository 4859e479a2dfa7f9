import pg from 'pg'
import { migrateDatabase } from '../../server/database/migrate'
import { loadDemo } from '../../dev/loadDemo'
import { startTestCluster } from '../../scripts/lib/testCluster'
import { onDatabase } from '../support/addresses'
import { runBuilt } from '../support/built'
import { DEMO_MORNING } from '../support/demoMorning'
import { signedIn } from '../support/visitor'
import { benchAct, type Place } from './act'
import { fillBigCellar, medianMillis } from './bigCellar'
import { firstLoadOf } from './firstLoad'
import { benchReplay } from './replay'
import { benchSignIn } from './signIn'
import { benchVessels } from './vessels'

/*
 * What is held to a figure, measured in one run on one machine: ratios against a floor that stands beside them, and counts.
 * Nothing passes or fails here: a slow day of the machine is no fault of the code. Read the figures.
 */

function line(what: string, measured: string, wanted: string): void {
  console.log(`${what}: ${measured}   [${wanted}]`)
}

const spread = ({ median, lowest, highest }: { median: number, lowest: number, highest: number }) => `${median.toFixed(2)} (${lowest.toFixed(2)} to ${highest.toFixed(2)})`

const { ofMeanOnly, ofEager, doubled, milliseconds } = benchReplay()
line('Replay of 60 vessels × 20 years ÷ a typed-array loop that keeps the mean alone', `${ofMeanOnly.toFixed(2)} (${milliseconds.toFixed(2)} ms)`, '0.1 or more')
line('The same ÷ a replay that scales every cohort at each draw', ofEager.toFixed(1), '5 or more')
line('Time for twice the lines ÷ time for the lines', doubled.toFixed(2), 'about 2')

const { cluster, addresses, remove } = await startTestCluster({ durable: true })
try {
  await cluster.createDatabase('bench')
  await migrateDatabase(onDatabase(addresses.owner, 'bench'))
  const databaseUrl = onDatabase(addresses.app, 'bench')
  const superuserUrl = onDatabase(addresses.superuser, 'bench')
  await loadDemo({ databaseUrl, now: new Date(DEMO_MORNING) })
  const server = await runBuilt({ databaseUrl, now: DEMO_MORNING, env: { UNDERCROFT_LOG: 'info' } })
  try {
    const owner = await signedIn(server.origin, 'owner@sallowmere.example')
    const { kB, files } = firstLoadOf((await owner.get('/cellar', { accept: 'text/html' })).text)
    line('First load of Cellar, JavaScript, gzipped', `${kB.toFixed(1)} kB in ${files.length} files`, 'at most 110 kB')
    line('GET /api/vessels ÷ bare Nitro and pg with the same SQL, requests a second', spread(await benchVessels({ origin: server.origin, cookie: owner.cookie ?? '' }, superuserUrl)), '0.4 or more')
    line('Recording an act ÷ pgbench with the same statements, fsync on', spread(await benchAct(await placeIn(superuserUrl, server.origin, owner.cookie ?? ''))), '0.4 or more')
    line('Sign-in, unknown address ÷ known one, median time', (await benchSignIn(server.origin)).toFixed(3), '0.95 to 1.05')

    const other = await signedIn(server.origin, 'owner@quernhollow.example')
    await fillBigCellar(other)
    line('The Cellar page with 61 vessels, sent by the server', `${(await medianMillis(other, '/cellar')).toFixed(0)} ms`, 'within 60 ms')
  }
  finally {
    await server.stop()
  }
}
finally {
  await remove()
}

async function placeIn(superuserUrl: string, origin: string, cookie: string): Promise<Place> {
  const client = new pg.Client({ connectionString: superuserUrl })
  await client.connect()
  try {
    const { rows: [row] } = await client.query<{ brewery: string, vessel: string, person: string }>(`
      select v.brewery_id as brewery, v.id as vessel, m.user_id as person from vessels v
      join memberships m on m.brewery_id = v.brewery_id and m.role = 'owner' where v.name = 'Heron'`)
    if (!row) throw new Error('the demo has no Heron')
    return { origin, cookie, superuserUrl, breweryId: row.brewery, vesselId: row.vessel, personId: row.person }
  }
  finally {
    await client.end()
  }
}
