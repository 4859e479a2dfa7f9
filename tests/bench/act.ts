import { execFile } from 'node:child_process'
import { mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { promisify } from 'node:util'
import autocannon from 'autocannon'
import { v7 as newId } from 'uuid'
import { CELLAR_SQL } from './sql'

const SECONDS = 4
const ROUNDS = 5
const CLIENTS = 8

/** Where a draw can be recorded. */
export interface Place {
  origin: string
  cookie: string
  superuserUrl: string
  breweryId: string
  vesselId: string
  personId: string
}

/**
 * Acts recorded a second over HTTP, with session, role, policies, checks and replay, ÷ transactions a second of pgbench
 * that run the same statements against the same cluster, which keeps its promise to the disk.
 */
export async function benchAct(place: Place): Promise<{ median: number, lowest: number, highest: number }> {
  const folder = mkdtempSync(join(tmpdir(), 'undercroft-pgbench-'))
  const script = join(folder, 'act.sql')
  writeFileSync(script, scriptFor(place))
  try {
    const ratios: number[] = []
    for (let round = 0; round < ROUNDS; round++) ratios.push(await overHttp(place) / await pgbench(script, place.superuserUrl))
    ratios.sort((a, b) => a - b)
    return { median: ratios[Math.floor(ROUNDS / 2)] ?? NaN, lowest: ratios[0] ?? NaN, highest: ratios.at(-1) ?? NaN }
  }
  finally {
    rmSync(folder, { recursive: true, force: true })
  }
}

async function overHttp({ origin, cookie, vesselId }: Place): Promise<number> {
  const { requests, non2xx, errors } = await autocannon({
    url: `${origin}/api/acts`, connections: CLIENTS, duration: SECONDS,
    requests: [{
      method: 'POST',
      headers: { cookie, 'content-type': 'application/json', 'sec-fetch-site': 'same-origin' },
      setupRequest: request => ({ ...request, body: JSON.stringify({ id: newId(), movements: [{ id: newId(), kind: 'sample', vesselId, litres: 0.001, occurredOn: '2026-09-14' }] }) }),
    }],
  })
  if (non2xx > 0 || errors > 0) throw new Error(`of the acts sent ${non2xx} were refused and ${errors} failed`)
  return requests.average
}

async function pgbench(script: string, url: string): Promise<number> {
  const [newest = ''] = readdirSync('/usr/lib/postgresql').sort((a, b) => Number(b) - Number(a))
  const { stdout } = await promisify(execFile)(`/usr/lib/postgresql/${newest}/bin/pgbench`, ['-n', '-M', 'prepared', '-c', String(CLIENTS), '-j', '1', '-T', String(SECONDS), '-f', script, url])
  return Number(/tps = ([\d.]+)/.exec(stdout)?.[1])
}

/** The statements of one recorded act, in their order. */
function scriptFor({ breweryId, vesselId, personId }: Place): string {
  const cellar = CELLAR_SQL.map(text => `${text.replace(/\s+/g, ' ').replaceAll('$1', `'${breweryId}'`)};`)
  const act = `select acts.*, users.name from acts join users on users.id = acts.recorded_by where acts.brewery_id = '${breweryId}' and acts.id = :act::uuid;`
  return [
    'begin;',
    `select gen_random_uuid()::text as act, set_config('undercroft.brewery', '${breweryId}', true), set_config('undercroft.person', '${personId}', true) \\gset`,
    act, ...cellar,
    'savepoint step;',
    `insert into acts (brewery_id, id, recorded_at, recorded_by) values ('${breweryId}', :act::uuid, now(), '${personId}');`,
    `insert into movements (brewery_id, id, act_id, position, kind, vessel_id, litres, occurred_on, place_in_day) values ('${breweryId}', :act::uuid, :act::uuid, 0, 'sample', '${vesselId}', 0.001, '2026-09-14', 2);`,
    'release savepoint step;',
    `insert into audit_events (brewery_id, id, at, person_id, action, subject_kind, subject_id) values ('${breweryId}', gen_random_uuid(), now(), '${personId}', 'act.recorded', 'act', :act::uuid);`,
    'commit;',
  ].join('\n')
}
