import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { openApiOf } from '../../shared/schemas/openApi'
import { ROUTES } from '../../shared/schemas/routes'
import { startServer, type TestServer } from '../support/server'
import { signedIn, visitor, type Reply, type Visitor } from '../support/visitor'

let server: TestServer
let owner: Visitor
beforeAll(async () => {
  server = await startServer()
  owner = await signedIn(server.origin, 'owner@sallowmere.example')
})
afterAll(() => server?.stop())

const PAGE = { accept: 'text/html' }

async function everyKind(): Promise<[string, Reply][]> {
  const page = await owner.get('/cellar', PAGE)
  const [script = ''] = /\/_nuxt\/[\w-]+\.js/.exec(page.text) ?? []
  const anonymous = visitor(server.origin)
  return [
    ['a page', page],
    ['a page that is not there', await owner.get('/nothing-here', PAGE)],
    ['a redirect', await anonymous.get('/cellar', PAGE)],
    ['the API', await owner.get('/api/vessels')],
    ['a refusal', await anonymous.get('/api/vessels')],
    ['an unknown address of the API', await owner.get('/api/nothing')],
    ['a file', await owner.get('/favicon.svg')],
    ['a script', await owner.get(script)],
    ['a script that is not there', await owner.get('/_nuxt/nothing.js')],
    ['a wrong method', await owner.request('OPTIONS', '/api/vessels')],
    ['a foreign origin', await owner.request('POST', '/api/vessels', { body: {}, headers: { 'sec-fetch-site': 'cross-site' } })],
    ['nothing to say', await anonymous.post('/api/auth/sign-out')],
  ]
}

describe('every answer', () => {
  it('carries the headers that keep a browser safe, and says nothing of what we are made of', async () => {
    for (const [kind, reply] of await everyKind()) {
      const { headers } = reply
      expect(headers.get('content-security-policy'), kind).toMatch(/default-src 'none'; script-src 'self' 'nonce-[\w+/=]{24}'; .*base-uri 'none'; object-src 'none'; frame-ancestors 'none'$/)
      expect(headers.get('content-security-policy'), kind).not.toMatch(/unsafe-eval|script-src[^;]*unsafe-inline/)
      expect(headers.get('x-content-type-options'), kind).toBe('nosniff')
      expect(headers.get('x-frame-options'), kind).toBe('DENY')
      expect(headers.get('referrer-policy'), kind).toMatch(/^(same-origin|no-referrer)$/)
      expect(headers.get('cross-origin-opener-policy'), kind).toBe('same-origin')
      expect(headers.get('x-request-id'), kind).toMatch(/^[\da-f-]{36}$/)
      expect(headers.get('x-powered-by'), kind).toBeNull()
      expect(headers.get('server'), kind).toBeNull()
      expect(headers.get('access-control-allow-origin'), kind).toBeNull()
    }
  })

  it('is kept by nobody, save the files of the build', async () => {
    for (const [kind, reply] of await everyKind()) {
      const cache = reply.headers.get('cache-control') ?? ''
      if (kind === 'a script') expect(cache, kind).toContain('immutable')
      else if (kind !== 'a file') expect(cache, kind).toMatch(/no-store|no-cache/)
    }
    for (const path of ['/api/vessels', '/api/me', '/cellar']) expect((await owner.get(path, PAGE)).headers.get('cache-control'), path).toBe('no-store')
  })

  it('uses each nonce once, on every script and style of the page', async () => {
    const [first, second] = [await owner.get('/cellar', PAGE), await owner.get('/cellar', PAGE)]
    const nonceOf = (reply: Reply) => /'nonce-([^']+)'/.exec(reply.headers.get('content-security-policy') ?? '')?.[1]
    expect(nonceOf(first)).not.toBe(nonceOf(second))
    const tags = first.text.match(/<(script|style)[^>]*>/g) ?? []
    expect(tags.length).toBeGreaterThan(1)
    for (const tag of tags) expect(tag).toContain(`nonce="${nonceOf(first)}"`)
  })

  it('to a page names nobody and no vessel when nobody is signed in', async () => {
    await owner.get('/cellar', PAGE)
    for (const path of ['/cellar', '/cellar?x=.css', '/cellar/_payload.json', '/vessels/new', '/you']) {
      const { text } = await visitor(server.origin).get(path, PAGE)
      expect(text, path).not.toMatch(/Heron|Odile|sallowmere/)
    }
  })
})

describe('a problem', () => {
  it.each([
    ['signedOut', 401, () => visitor(server.origin).get('/api/me')],
    ['notFound', 404, () => owner.get('/api/nothing')],
    ['methodNotAllowed', 405, () => owner.request('PUT', '/api/vessels', { body: {} })],
    ['unreadable', 400, () => owner.request('POST', '/api/vessels', { body: '{', headers: { 'content-type': 'application/json' } })],
    ['unsupportedType', 415, () => owner.request('POST', '/api/vessels', { body: 'x', headers: { 'content-type': 'text/plain' } })],
    ['foreignOrigin', 403, () => owner.request('POST', '/api/vessels', { body: {}, headers: { 'sec-fetch-site': 'cross-site' } })],
    ['invalid', 422, () => owner.post('/api/vessels', {})],
  ] as const)('%s has the members of RFC 9457 and our own', async (code, status, ask) => {
    const reply = await ask()
    expect(reply.status).toBe(status)
    expect(reply.headers.get('content-type')).toBe('application/problem+json')
    expect(reply.json).toEqual({ type: 'about:blank', title: expect.any(String), status, detail: expect.any(String), code, errors: expect.any(Array) })
  })
})

describe('the OpenAPI document', () => {
  it('tells every route, from the schemas themselves', async () => {
    const reply = await visitor(server.origin).get('/api/openapi.json')
    expect(reply.json).toEqual(JSON.parse(JSON.stringify(openApiOf(Object.values(ROUTES), { version: '0.1.0', origin: server.origin }))))
    expect(reply.json).toMatchObject({ openapi: '3.1.0', paths: { '/api/vessels': { post: { 'x-ability': 'editVessels', 'requestBody': { content: { 'application/json': { schema: { required: ['id', 'name', 'kind', 'workingLitres'] } } } } } } } })
  })
})

describe('over https', () => {
  it('the cookie is bound to the host and the browser is told to stay on https', async () => {
    const secure = await startServer({ db: server.db, env: { UNDERCROFT_ORIGIN: 'https://cellar.example' } })
    try {
      const reply = await visitor(secure.origin).request('POST', '/api/auth/sign-in', { body: { email: 'owner@sallowmere.example', password: 'sallowmere-cellar' }, headers: { origin: 'https://cellar.example' } })
      expect(reply.status).toBe(200)
      expect(reply.headers.get('strict-transport-security')).toBe('max-age=63072000; includeSubDomains')
      const [cookie = ''] = reply.headers.getSetCookie()
      expect(cookie).toMatch(/^__Host-undercroft=.*; Path=\/; Expires=.*; HttpOnly; Secure; SameSite=Lax$/)
      expect((await visitor(secure.origin).request('POST', '/api/auth/sign-out', { body: {}, headers: { origin: secure.origin } })).status).toBe(403)
    }
    finally {
      await secure.stop()
    }
  })
})

describe('a fault of our own', () => {
  it('is told to nobody, in the API as on a page, and noted for us without a secret', async () => {
    const broken = await startServer()
    try {
      const who = await signedIn(broken.origin, 'owner@sallowmere.example')
      await broken.db.asSuperuser('alter table memberships rename to elsewhere')
      const replies = [await who.get('/api/vessels'), await who.get('/api/me'), await who.get('/cellar', PAGE), await who.get('/vessels/new', PAGE)]
      for (const reply of replies) {
        expect(reply.status).toBe(500)
        expect(reply.text).not.toMatch(/memberships|relation|select |undercroft_app|node_modules|at async|\.ts:|enter_session/)
      }
      expect(replies[0]?.json).toMatchObject({ code: 'failed', detail: 'Something went wrong here. It has been noted; try again in a moment.' })
      await expect.poll(() => broken.printed()).toContain('memberships')
      expect(broken.printed()).not.toMatch(/sallowmere|Odile|Fe26/)
      expect(broken.printed()).toContain(replies[0]?.headers.get('x-request-id'))
    }
    finally {
      await broken.stop()
    }
  })
})

describe('with the database away', () => {
  it('the API and the pages say so, without a word of the driver, and come back by themselves', async () => {
    const cut = await startServer()
    try {
      const who = await signedIn(cut.origin, 'owner@sallowmere.example')
      await cut.db.asSuperuser(`select pg_terminate_backend(pid) from pg_stat_activity where usename = 'undercroft_app' and datname = $1`, [cut.db.name])
      await cut.db.asSuperuser(`alter database ${cut.db.name} connection limit 0`)
      const replies = [await who.get('/api/vessels'), await who.get('/api/health'), await who.get('/cellar', PAGE), await who.post('/api/auth/sign-in', { email: 'a@b.example', password: 'x' })]
      await cut.db.asSuperuser(`alter database ${cut.db.name} connection limit -1`)
      expect(replies.map(reply => reply.status)).toEqual([503, 503, 503, 503])
      expect(replies[0]?.headers.get('retry-after')).toBe('5')
      for (const reply of replies) expect(reply.text).not.toMatch(/ECONN|postgres|undercroft_app|role|stack|node_modules|127\.0\.0\.1:/i)
      expect((await who.get('/api/vessels')).status).toBe(200)
    }
    finally {
      await cut.db.asSuperuser(`alter database ${cut.db.name} connection limit -1`)
      await cut.stop()
    }
  })
})
