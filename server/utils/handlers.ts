import { getQuery, getRouterParams, setResponseStatus, defineEventHandler, type EventHandler, type H3Event } from 'h3'
import type { z } from 'zod'
import { can, type Ability } from '#shared/abilities'
import { civilDateIn } from '#shared/cellar/civilDate'
import type { RouteInput, RouteShape } from '#shared/schemas/route'
import { Fault } from '#shared/types/fault'
import { audit } from '#server/commands/audit'
import type { Work } from '#server/commands/work'
import type { Database, Tx } from '#server/database/client'
import { withSession, type Entered } from '#server/database/door'
import { mayStillEnter } from '#server/database/queries/people'
import { useClock } from './clock'
import { useDatabase } from './database'
import { endProgress } from './progress'
import { readInput } from './readInput'
import { readJson, readText } from './requestBody'
import { sessionHashOf } from './sessionCookie'

/** An answer with a status other than 200. */
export class Answer<T> {
  constructor(readonly status: number, readonly body: T) {}
}

export function answer<T>(status: number, body: T): Answer<T> {
  return new Answer(status, body)
}

interface PublicCall<R extends RouteShape> extends RouteInput<R> {
  event: H3Event
  database: Database
  now: Date
}

interface PersonCall<R extends RouteShape> extends RouteInput<R> {
  event: H3Event
  tx: Tx
  entered: Entered
  sessionHash: string
  now: Date
}

interface BreweryCall<R extends RouteShape> extends RouteInput<R> {
  event: H3Event
  work: Work
}

/** A route for anybody. */
export function definePublicHandler<R extends RouteShape, T>(route: R, handle: (call: PublicCall<R>) => T | Promise<T>): EventHandler {
  return defineEventHandler(async (event) => {
    const input = inputOf(route, event, await bodyOf(route, event))
    return reply(event, await handle({ ...input, event, database: useDatabase(), now: useClock().now() }))
  })
}

/** A route for anybody who is signed in, whichever brewery they are in. */
export function definePersonHandler<R extends RouteShape, T>(route: R, handle: (call: PersonCall<R>) => Promise<T>): EventHandler {
  return defineEventHandler(async (event) => {
    const sessionHash = await requireSessionHash(event)
    const body = await bodyOf(route, event)
    const now = useClock().now()
    return reply(event, await withSession(useDatabase(), sessionHash, now, async (entered, tx) => {
      if (!entered) throw signedOut()
      return handle({ ...inputOf(route, event, body), event, tx, entered, sessionHash, now })
    }))
  })
}

/**
 * A route of a brewery. The session is looked up and the role asked in the very transaction that does the work, so a
 * role taken away a second ago counts; what was sent is read through the schema only after that.
 */
export function defineBreweryHandler<R extends RouteShape & { access: { ability: Ability } }, T>(route: R, handle: (call: BreweryCall<R>) => Promise<T>): EventHandler {
  return defineEventHandler(async (event) => {
    const sessionHash = await requireSessionHash(event)
    const now = useClock().now()
    // A file is not even waited for from somebody who may not send one.
    if (route.text && await withSession(useDatabase(), sessionHash, now, (entered, tx) => refusal(requireMember(entered, tx, now), route))) throw forbidden()
    const body = await bodyOf(route, event)
    const result = await withSession(useDatabase(), sessionHash, now, async (entered, tx) => {
      const work = requireMember(entered, tx, now)
      if (await refusal(work, route)) return REFUSED
      return handle({ ...inputOf(route, event, body), event, work })
    })
    // Thrown only now, so that the line in the trail is kept.
    if (result === REFUSED) throw forbidden()
    return reply(event, result)
  })
}

const REFUSED = Symbol('refused')

/** Whether the role does not allow a route; then it is written into the trail. */
async function refusal(work: Work, route: RouteShape & { access: { ability: Ability } }): Promise<boolean> {
  if (can(work.role, route.access.ability)) return false
  await audit(work, { action: 'refused', detail: { route: `${route.method} ${route.path}`, role: work.role } })
  return true
}

function forbidden(): Fault {
  return new Fault('forbidden', 'Your role does not allow this here.')
}

async function requireSessionHash(event: H3Event): Promise<string> {
  const hash = await sessionHashOf(event)
  if (hash === null) throw signedOut()
  return hash
}

function requireMember(entered: Entered | null, tx: Tx, now: Date): Work {
  if (!entered) throw signedOut()
  const { user, member } = entered
  if (!member || !mayStillEnter(member.accessUntil, member.timeZone, now)) {
    throw new Fault('forbidden', 'You are in no brewery’s crew here at present.')
  }
  return {
    tx,
    brewery: { id: member.breweryId, name: member.breweryName, timeZone: member.timeZone },
    person: user,
    role: member.role,
    now,
    // Asked for by few, and dear: worked out when it is.
    get today() {
      return civilDateIn(member.timeZone, now.getTime())
    },
  }
}

function signedOut(): Fault {
  return new Fault('signedOut', 'You are not signed in, or no longer.')
}

function bodyOf(route: RouteShape, event: H3Event): Promise<unknown> {
  if (route.text) return readText(event, route.text)
  return route.method === 'GET' ? Promise.resolve(undefined) : readJson(event)
}

function inputOf<R extends RouteShape>(route: R, event: H3Event, body: unknown): RouteInput<R>
function inputOf(route: RouteShape, event: H3Event, body: unknown): RouteInput<RouteShape> {
  return {
    params: route.params && paramsOf(route.params, event),
    query: route.query && readInput(route.query, getQuery(event)),
    body: route.body && readInput(route.body, body),
    text: route.text && typeof body === 'string' ? body : undefined,
  }
}

// An id that cannot be one is answered like one that nothing bears.
function paramsOf(schema: z.ZodType, event: H3Event): unknown {
  const read = schema.safeParse(getRouterParams(event, { decode: true }))
  if (!read.success) throw new Fault('notFound', 'There is nothing under this address.')
  return read.data
}

function reply<T>(event: H3Event, result: T | Answer<T>): T | undefined {
  if (endProgress(event, result)) return undefined
  if (!(result instanceof Answer)) return result
  setResponseStatus(event, result.status)
  return result.body
}
