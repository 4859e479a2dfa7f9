import { readdirSync } from 'node:fs'
import { createHash } from 'node:crypto'
import pLimit from 'p-limit'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { v7 as newId } from 'uuid'
import { can, ROLES, type Role } from '../../shared/abilities'
import type { RouteShape } from '../../shared/schemas/route'
import { ROUTES } from '../../shared/schemas/routes'
import { SAMPLES, type Around } from './requests'
import { startServer, type TestServer } from '../support/server'
import { signedIn, visitor, type Visitor } from '../support/visitor'

const EMAILS: Record<Role, string> = {
  owner: 'owner@sallowmere.example',
  headBrewer: 'brewer@sallowmere.example',
  cellarLead: 'lead@sallowmere.example',
  cellarHand: 'hand@sallowmere.example',
  packager: 'packaging@sallowmere.example',
  taster: 'taster@sallowmere.example',
  auditor: 'auditor@sallowmere.example',
}

let server: TestServer
const crew = new Map<Role, Visitor>()
let stranger: Visitor
let home: Around
beforeAll(async () => {
  server = await startServer({ env: { UNDERCROFT_DATABASE_CONNECTIONS: '2' } })
  for (const role of ROLES) crew.set(role, await signedIn(server.origin, EMAILS[role]))
  stranger = await signedIn(server.origin, 'owner@quernhollow.example')
  const [brewery] = await server.db.asSuperuser<{ id: string }>(`select id from breweries where name = 'Sallowmere Brewing'`)
  home = { breweryId: brewery?.id ?? '', ...nothing() }
})
afterAll(() => server?.stop())

const names = Object.keys(ROUTES) as (keyof typeof ROUTES)[]
const routeOf = (name: keyof typeof ROUTES): RouteShape => ROUTES[name]
const abilityOf = (route: RouteShape) => typeof route.access === 'object' ? route.access.ability : undefined

/** A vessel, a brew and an act of the first brewery that nothing else in this file touches. */
async function somethingNew(): Promise<Omit<Around, 'breweryId'>> {
  const [vesselId, actId, movementId, brewId] = [newId(), newId(), newId(), newId()]
  await aVessel(vesselId)
  const keg = newId()
  await aVessel(keg)
  await server.db.asSuperuser(`insert into acts (brewery_id, id, recorded_at, recorded_by) select $1, $2, now(), id from users where email = $3`, [home.breweryId, actId, EMAILS.owner])
  await server.db.asSuperuser(`insert into movements (brewery_id, id, act_id, position, kind, vessel_id, litres, occurred_on, place_in_day) values ($1, $2, $3, 0, 'sample', $4, 0.1, '2026-09-01', 2)`, [home.breweryId, movementId, actId, keg])
  await server.db.asSuperuser(`insert into brews (brewery_id, id, code, brewed_on, created_at) values ($1, $2, $3, '2026-08-03', now())`, [home.breweryId, brewId, `Q${brewId}`])
  return { vesselId, actId, movementId, brewId }
}

async function aVessel(id: string): Promise<void> {
  await server.db.asSuperuser(`insert into vessels (brewery_id, id, name, kind, working_litres, wood, walking_order, created_at) values ($1, $2, $3, 'keg', 50, false, 99, now())`, [home.breweryId, id, `Matrix ${id}`])
}

/** Ids that nothing bears. */
const nothing = () => ({ vesselId: newId(), actId: newId(), movementId: newId(), brewId: newId() })

async function ask(name: keyof typeof ROUTES, who: Visitor, around?: Omit<Around, 'breweryId'>) {
  const sample = SAMPLES[name]({ ...home, ...around })
  return who.request(routeOf(name).method, sample.path, { body: sample.body, headers: sample.headers })
}

/** A digest of all that a brewery has, so that a refused request can be seen to have changed nothing. */
async function state(): Promise<string> {
  const rows = await server.db.asSuperuser(`select 'v' as t, to_jsonb(v) as r from vessels v union all select 'm', to_jsonb(m) from memberships m union all select 'b', to_jsonb(b) from breweries b union all select 'e', to_jsonb(e) from beers e union all select 'c', to_jsonb(c) from closed_days c union all select 'u', to_jsonb(u) from users u union all select 'w', to_jsonb(w) from brews w union all select 'a', to_jsonb(a) from acts a union all select 'l', to_jsonb(l) from movements l union all select 'r', to_jsonb(r) from reversals r union all select 'n', to_jsonb(n) from ledger_notes n union all select 's', to_jsonb(s) from vessel_events s order by 1, 2`)
  return createHash('sha256').update(JSON.stringify(rows)).digest('hex')
}

const refusals = async () => (await server.db.asSuperuser<{ n: number }>(`select count(*)::int as n from audit_events where action = 'refused'`))[0]?.n ?? 0

it('has a line for every file in server/api, and a file for every line', () => {
  const files = readdirSync('server/api', { recursive: true, encoding: 'utf8' }).filter(file => file.endsWith('.ts')).map(file => `server/api/${file}`).filter(file => !file.endsWith('[...].ts')).map((file) => {
    const [, path = '', method = ''] = /^server(\/api\/.*?)(?:\/index)?\.(get|post|put|patch|delete)\.ts$/.exec(file) ?? []
    return `${method.toUpperCase()} ${path.replace(/\[(\w+)\]/g, '{$1}')}`
  })
  expect(files.sort()).toEqual(names.map(name => `${routeOf(name).method} ${routeOf(name).path}`).sort())
})

describe.each(names)('%s', (name) => {
  const route = routeOf(name)
  const ability = abilityOf(route)
  const endsSessions = name === 'signOut' || name === 'signOutEverywhere' || name === 'signIn'

  it(route.access === 'public' ? 'answers anybody' : 'answers 401 to somebody who is not signed in', async () => {
    const before = await state()
    const { status } = await ask(name, visitor(server.origin))
    if (route.access === 'public') expect([200, 201, 204, 404]).toContain(status)
    else expect(status).toBe(401)
    expect(await state()).toBe(before)
  })

  it.each(ROLES)(ability ? `%s: as the table of abilities says of ${ability}` : '%s: answered', async (role) => {
    const who = endsSessions ? await signedIn(server.origin, EMAILS[role]) : crew.get(role) ?? visitor(server.origin)
    const around = await somethingNew()
    const [before, refusedBefore] = [await state(), await refusals()]
    const { status } = await ask(name, who, around)
    if (endsSessions) crew.set(role, await signedIn(server.origin, EMAILS[role]))
    if (ability === undefined || can(role, ability)) {
      expect(name === 'setUp' ? [404] : Object.keys(route.answers).map(Number)).toContain(status)
      return
    }
    expect(status).toBe(403)
    expect(await state()).toBe(before)
    expect(await refusals()).toBe(refusedBefore + 1)
  })

  if (route.access === 'public') return

  it('answers 401 to a cookie that was signed out', async () => {
    const who = await signedIn(server.origin, EMAILS.owner)
    const { cookie } = who
    await who.post('/api/auth/sign-out')
    expect((await ask(name, visitor(server.origin, cookie))).status).toBe(401)
  })

  if (!ability) return

  it('answers 403 to an owner who became a taster, or left the crew, or whose access ended, a second ago', async () => {
    const who = await signedIn(server.origin, EMAILS.owner)
    const was = `role = 'owner', access_until = null, ended_at = null`
    for (const now of [`role = 'taster'`, 'ended_at = now()', `access_until = '2026-09-13'`]) {
      await server.db.asSuperuser(`update memberships set ${now} where brewery_id = $1 and user_id = (select id from users where email = $2)`, [home.breweryId, EMAILS.owner])
      const around = await somethingNew()
      const before = await state()
      const { status } = await ask(name, who, around)
      expect(await state(), now).toBe(before)
      await server.db.asSuperuser(`update memberships set ${was} where brewery_id = $1 and user_id = (select id from users where email = $2)`, [home.breweryId, EMAILS.owner])
      expect(status, now).toBe(403)
    }
  })

  if (!route.path.includes('{id}')) return

  it('answers another brewery’s id exactly like one that nobody has', async () => {
    const foreign = await somethingNew()
    const before = await state()
    const [theirs, nobodys] = [await ask(name, stranger, foreign), await ask(name, stranger, nothing())]
    expect([theirs.status, theirs.text]).toEqual([404, nobodys.text])
    expect(nobodys.status).toBe(404)
    expect(await state()).toBe(before)
  })
})

describe('what a brewery sees', () => {
  it('is its own vessels alone', async () => {
    const own = await stranger.get('/api/vessels')
    expect(own.json).toMatchObject([{ name: 'Rook' }])
    expect(own.json).toHaveLength(1)
  })

  it('stays apart in two hundred requests at once, some of them broken off or failing', async () => {
    const owner = await signedIn(server.origin, EMAILS.owner)
    const theirs = (await owner.get('/api/vessels')).text
    const ours = (await stranger.get('/api/vessels')).text
    const inTurn = pLimit(20)
    await Promise.all(Array.from({ length: 200 }, (_, n) => inTurn(async () => {
      if (n % 9 === 0) await fetch(`${server.origin.replace('localhost', '127.0.0.1')}/api/vessels`, { headers: { cookie: owner.cookie ?? '' }, signal: AbortSignal.timeout(1 + n % 5) }).catch(() => {})
      if (n % 11 === 0) await owner.post('/api/vessels', { id: newId(), name: 'Heron', kind: 'vat', workingLitres: 1 })
      const [text, expected] = n % 2 ? [(await owner.get('/api/vessels')).text, theirs] : [(await stranger.get('/api/vessels')).text, ours]
      expect(text).toBe(expected)
    })))
  })
})
