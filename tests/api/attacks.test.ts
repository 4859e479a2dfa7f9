import { connect } from 'node:net'
import { v7 as newId } from 'uuid'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { startServer, type TestServer } from '../support/server'
import { signedIn, visitor, type Reply, type Visitor } from '../support/visitor'
import { DEMO_PASSWORD } from '../../dev/loadDemo'

let server: TestServer
let owner: Visitor
beforeAll(async () => {
  server = await startServer({ env: { UNDERCROFT_LOG: 'debug' } })
  owner = await signedIn(server.origin, 'owner@sallowmere.example')
})
afterAll(() => server?.stop())

const aVessel = (more: Record<string, unknown> = {}) => {
  const id = newId()
  return { id, name: `Vessel ${id}`, kind: 'barrel', workingLitres: 225, ...more }
}
const create = (more: Record<string, unknown>) => owner.post('/api/vessels', aVessel(more))
const fieldsOf = (reply: Reply) => (reply.json as { errors: { field: string }[] }).errors.map(error => error.field)
const nowhere = () => owner.get('/api/vessels').then(reply => reply.text)

/** Bytes over a bare socket, for what no well-behaved client sends. */
function raw(text: string, wait = 1500): Promise<string> {
  return new Promise((resolve) => {
    const socket = connect(server.port, '127.0.0.1', () => socket.write(text))
    let answer = ''
    socket.setEncoding('utf8').on('data', (part: string) => {
      answer += part
    }).on('close', () => resolve(answer)).on('error', () => resolve(answer))
    setTimeout(() => socket.destroy(), wait)
  })
}

describe('what is sent', () => {
  it.each(['breweryId', 'brewery_id', 'role', 'version', 'createdAt', '__proto__', 'constructor'])('a field %s that is not the sender’s to set is refused by name and not kept', async (field) => {
    const before = await nowhere()
    const reply = await owner.request('POST', '/api/vessels', { body: JSON.stringify(aVessel()).replace('{', `{"${field}":{"x":1},`) })
    expect(reply.status).toBe(422)
    expect(fieldsOf(reply)).toEqual([field])
    expect(await nowhere()).toBe(before)
  })

  it.each([
    ['a list for a text', { name: ['a', 'b'] }, 'name'],
    ['a number for a text', { name: 7 }, 'name'],
    ['a text for a number', { workingLitres: '225' }, 'workingLitres'],
    ['an object for a number', { workingLitres: { $gt: 0 } }, 'workingLitres'],
    ['nought litres', { workingLitres: 0 }, 'workingLitres'],
    ['litres below nought', { workingLitres: -1 }, 'workingLitres'],
    ['a NUL', { name: 'He\u0000ron' }, 'name'],
    ['half a character', { name: 'He\uD800ron' }, 'name'],
    ['a line break', { name: 'Heron\nBcc: x' }, 'name'],
    ['an escape sequence', { name: '\u001B[31mHeron' }, 'name'],
    ['a line separator', { name: 'Heron\u2028x' }, 'name'],
    ['only spaces', { name: '   ' }, 'name'],
    ['a long name', { name: 'x'.repeat(61) }, 'name'],
    ['a kind that is none', { kind: 'tub' }, 'kind'],
    ['an id that is none', { id: '\' OR 1=1--' }, 'id'],
    ['a name that is taken', { name: 'hErOn' }, 'name'],
    ['a place that is none', { walkingOrder: 1.5 }, 'walkingOrder'],
    ['four decimals', { workingLitres: 1.0001 }, 'workingLitres'],
    ['less than a thousandth', { workingLitres: 1e-8 }, 'workingLitres'],
  ])('%s: a word at the field, nothing kept', async (_, more, field) => {
    const before = await nowhere()
    const reply = await create(more)
    expect(reply.status).toBe(422)
    expect(fieldsOf(reply)).toEqual([field])
    expect(await nowhere()).toBe(before)
  })

  it.each(['1e400', '1e30', 'NaN', '-0'])('%s litres are refused', async (litres) => {
    const reply = await owner.request('POST', '/api/vessels', { body: JSON.stringify(aVessel()).replace('225', litres) })
    expect([400, 422]).toContain(reply.status)
  })

  it.each(['{', '', '[]', 'null', '"x"', '\uFEFF{"a":1}', `${'['.repeat(10_000)}${']'.repeat(10_000)}`])('a body that is no object is a problem, never a failure: %j', async (body) => {
    const reply = await owner.request('POST', '/api/vessels', { body, headers: { 'content-type': 'application/json' } })
    expect([400, 422]).toContain(reply.status)
    expect(reply.headers.get('content-type')).toBe('application/problem+json')
  })

  it.each(['\' OR 1=1--', '"; drop table vessels; --', '<img src=x onerror=alert(1)>', '{{7*7}}', '</script><script>alert(1)</script>', '=cmd|x', '../../etc/passwd'])('%s is a name like any other', async (text) => {
    const reply = await create({ name: `${text} ${newId().slice(-6)}`.slice(0, 60) })
    expect(reply.status).toBe(201)
    expect(reply.json).toMatchObject({ name: expect.stringContaining(text) })
  })

  it.each(['on=2026-09-14&on=2026-09-15', 'on=2026-02-31', 'on=yesterday', 'sort=name;select', 'limit=-1', 'brewery_id=x'])('a query ?%s that is not known is refused', async (query) => {
    const reply = await owner.get(`/api/vessels?${query}`)
    expect(reply.status).toBe(422)
  })

  it('the same vessel sent twice is kept once; another under its id is refused', async () => {
    const vessel = aVessel()
    const replies = [await owner.post('/api/vessels', vessel), await owner.post('/api/vessels', vessel), await owner.post('/api/vessels', { ...vessel, workingLitres: 300 })]
    expect(replies.map(reply => reply.status)).toEqual([201, 200, 409])
    expect(replies[1]?.text).toBe(replies[0]?.text)
    expect(replies[2]?.json).toMatchObject({ code: 'sameIdOtherContent', current: { workingLitres: 225 } })
  })

  it('the same vessel sent twenty times at once is kept once', async () => {
    const vessel = aVessel()
    const replies = await Promise.all(Array.from({ length: 20 }, () => owner.post('/api/vessels', vessel)))
    expect(replies.map(reply => reply.status).filter(status => status === 201)).toHaveLength(1)
    expect(replies.every(reply => reply.status === 200 || reply.status === 201)).toBe(true)
  })

  it('of twenty changes of one version at once one is made, the others see what is there now', async () => {
    const vessel = aVessel()
    await owner.post('/api/vessels', vessel)
    const replies = await Promise.all(Array.from({ length: 20 }, (_, n) => owner.patch(`/api/vessels/${vessel.id}`, { version: 1, workingLitres: 300 + n })))
    expect(replies.map(reply => reply.status).sort()).toEqual([200, ...Array.from({ length: 19 }, () => 409)])
    const made = replies.find(reply => reply.status === 200)
    for (const reply of replies) if (reply.status === 409) expect(reply.json).toMatchObject({ code: 'stale', current: made?.json })
  })
})

describe('where it comes from', () => {
  it.each([
    ['a form of another site', { 'sec-fetch-site': 'cross-site', 'content-type': 'application/x-www-form-urlencoded' }, 403],
    ['a sibling of our domain', { 'sec-fetch-site': 'same-site' }, 403],
    ['an address typed by hand', { 'sec-fetch-site': 'none' }, 403],
    ['another origin', { 'sec-fetch-site': '', 'origin': 'https://evil.example' }, 403],
    ['the null origin', { 'sec-fetch-site': '', 'origin': 'null' }, 403],
    ['another origin that calls itself ours', { origin: 'https://evil.example' }, 403],
    ['our own page, as a form', { 'content-type': 'application/x-www-form-urlencoded' }, 415],
    ['our own page, as text', { 'content-type': 'text/plain' }, 415],
  ])('a change from %s is refused', async (_, headers, status) => {
    const before = await nowhere()
    const reply = await owner.request('POST', '/api/vessels', { body: aVessel(), headers })
    expect(reply.status).toBe(status)
    expect(await nowhere()).toBe(before)
  })

  it('a change that says nothing of where it comes from is refused', async () => {
    const body = JSON.stringify(aVessel())
    const answer = await raw(`POST /api/vessels HTTP/1.1\r\nHost: x\r\nConnection: close\r\nCookie: ${owner.cookie}\r\nContent-Type: application/json\r\nContent-Length: ${body.length}\r\n\r\n${body}`)
    expect(answer).toMatch(/^HTTP\/1\.1 403/)
  })

  it('a program that names our origin, or its twin on this machine, is let in', async () => {
    for (const origin of [server.origin, server.origin.replace('localhost', '127.0.0.1')]) {
      const body = JSON.stringify(aVessel())
      const answer = await raw(`POST /api/vessels HTTP/1.1\r\nHost: x\r\nConnection: close\r\nOrigin: ${origin}\r\nCookie: ${owner.cookie}\r\nContent-Type: application/json\r\nContent-Length: ${body.length}\r\n\r\n${body}`)
      expect(answer).toMatch(/^HTTP\/1\.1 201/)
    }
  })

  it('another site is given no leave to read or write', async () => {
    const reply = await owner.request('OPTIONS', '/api/vessels', { headers: { 'origin': 'https://evil.example', 'access-control-request-method': 'POST' } })
    expect([...reply.headers.keys()].filter(name => name.startsWith('access-control'))).toEqual([])
    expect((await owner.get('/api/vessels', { origin: 'https://evil.example' })).headers.has('access-control-allow-origin')).toBe(false)
  })

  it.each([['GET', '/api/auth/sign-out'], ['HEAD', '/api/auth/sign-out'], ['PUT', '/api/vessels'], ['TRACE', '/api/vessels'], ['GET', '/api/auth/sign-in?_method=POST']])('%s %s changes nothing', async (method, path) => {
    const before = await nowhere()
    const answer = await raw(`${method} ${path} HTTP/1.1\r\nHost: x\r\nConnection: close\r\nSec-Fetch-Site: same-origin\r\nX-HTTP-Method-Override: DELETE\r\nCookie: ${owner.cookie}\r\n\r\n`)
    expect(answer).toMatch(/^HTTP\/1\.1 (404|405)/)
    expect(await nowhere()).toBe(before)
  })
})

describe('the address', () => {
  it.each(['/API/vessels', '/Api/Vessels', '//api/vessels', '/api//vessels', '/%61pi/vessels', '/api/%76essels', '/./api/vessels', '/x/../api/vessels', '/api/vessels/', '/api/vessels;x', '/api/vessels%2f', '/api/vessels.', '/x/..%2fapi/vessels'])('%s gives somebody who is not signed in nothing', async (path) => {
    const answer = await raw(`GET ${path} HTTP/1.1\r\nHost: x\r\nConnection: close\r\n\r\n`)
    expect(answer).not.toContain('Heron')
  })

  it.each(['/.env', '/.git/HEAD', '/_nuxt/entry.js.map', '/__nuxt_devtools__/client/', '/_nitro/tasks', '/api/_auth/session', '/__nuxt_error?message=x', '/package.json', '/server/utils/settings.ts', '/api/_content', '/__nuxt_island/x'])('%s is not there', async (path) => {
    const reply = await owner.get(path)
    expect(reply.status).toBe(404)
  })
})

describe('the cookie', () => {
  it('is a new one at each sign-in, and the one that the browser came with ends', async () => {
    const first = await signedIn(server.origin, 'hand@sallowmere.example')
    const { cookie } = first
    await first.post('/api/auth/sign-in', { email: 'hand@sallowmere.example', password: DEMO_PASSWORD })
    expect(first.cookie).not.toBe(cookie)
    expect((await visitor(server.origin, cookie).get('/api/me')).status).toBe(401)
    expect((await first.get('/api/me')).status).toBe(200)
  })

  it('is dead on every device after signing out everywhere', async () => {
    const [here, there] = [await signedIn(server.origin, 'hand@sallowmere.example'), await signedIn(server.origin, 'hand@sallowmere.example')]
    await here.post('/api/auth/sign-out-everywhere')
    expect((await there.get('/api/me')).status).toBe(401)
  })

  it('cannot be made, cut, grown, or sent by another way', async () => {
    const [name = '', value = ''] = (owner.cookie ?? '').split('=')
    const cut = value.slice(0, -4)
    for (const cookie of [`${name}=x`, `${name}=${cut}`, `${name}=${value}x`, `${name}=${'x'.repeat(8000)}`, `${name}=`, `${name}=%00`, `__Host-${name}=${value}`, `${name}=Fe26.2**${'0'.repeat(64)}*a*b**c*d`]) {
      const reply = await visitor(server.origin, cookie).get('/api/me')
      expect([cookie.slice(0, 40), reply.status]).toEqual([cookie.slice(0, 40), 401])
    }
    expect((await visitor(server.origin).get('/api/me', { 'x-undercroft-session': value })).status).toBe(401)
  })

  it('is out of reach of scripts and of other sites, and holds no secret in the open', async () => {
    const reply = await visitor(server.origin).post('/api/auth/sign-in', { email: 'hand@sallowmere.example', password: DEMO_PASSWORD })
    const [cookie = ''] = reply.headers.getSetCookie()
    expect(cookie).toMatch(/^undercroft=Fe26/)
    expect(cookie).toMatch(/HttpOnly/)
    expect(cookie).toMatch(/SameSite=Lax/)
    expect(cookie).not.toMatch(/Secure/)
  })
})

describe('signing in', () => {
  it('answers a wrong password and an unknown address with the same words', async () => {
    const replies = await Promise.all(['owner@sallowmere.example', 'nobody@sallowmere.example', 'not an address', '\' or 1=1 --', 'a\u0000b@x.example', 'a\uD800@x.example'].map(email => visitor(server.origin).post('/api/auth/sign-in', { email, password: 'quite wrong here' })))
    for (const reply of replies) expect([reply.status, reply.text]).toEqual([401, replies[0]?.text])
  })

  it('takes an address in any case and with spaces round it', async () => {
    expect((await visitor(server.origin).post('/api/auth/sign-in', { email: ' Hand@Sallowmere.EXAMPLE ', password: DEMO_PASSWORD })).status).toBe(200)
  })

  it('refuses a password of a megabyte before it is hashed', async () => {
    const reply = await visitor(server.origin).post('/api/auth/sign-in', { email: 'hand@sallowmere.example', password: 'x'.repeat(1_000_000) })
    expect(reply.status).toBe(413)
    expect((await visitor(server.origin).post('/api/auth/sign-in', { email: 'hand@sallowmere.example', password: 'x'.repeat(10_000) })).status).toBe(422)
  })

  it('stops fifty wrong passwords, whatever X-Forwarded-For says, and counts no right one', async () => {
    const replies: Reply[] = []
    for (let n = 0; n < 50; n++) {
      replies.push(await visitor(server.origin).request('POST', '/api/auth/sign-in', { body: { email: 'taster2@sallowmere.example', password: `wrong ${n} wrong` }, headers: { 'x-forwarded-for': `203.0.113.${n}` } }))
    }
    expect(replies.slice(0, 10).every(reply => reply.status === 401)).toBe(true)
    expect(replies.slice(10).every(reply => reply.status === 429)).toBe(true)
    expect(Number(replies.at(-1)?.headers.get('retry-after'))).toBeGreaterThan(0)
    for (let n = 0; n < 12; n++) await signedIn(server.origin, 'auditor@sallowmere.example')
  }, 60_000)
})

describe('behind a proxy of our own', () => {
  it('people are told apart by the address that the proxy adds, and by no other', async () => {
    const proxied = await startServer({ env: { UNDERCROFT_TRUSTED_PROXIES: '1' } })
    try {
      const guess = (forwarded: string) => visitor(proxied.origin).request('POST', '/api/auth/sign-in', { body: { email: 'owner@sallowmere.example', password: 'quite wrong here' }, headers: { 'x-forwarded-for': forwarded } })
      for (let n = 0; n < 10; n++) expect((await guess(`198.51.100.${n}, 203.0.113.7`)).status).toBe(401)
      expect((await guess('198.51.100.99, 203.0.113.7')).status).toBe(429)
      expect((await guess('203.0.113.7, 203.0.113.8')).status).toBe(401)
    }
    finally {
      await proxied.stop()
    }
  })
})

describe('how much', () => {
  it('a body of 20 MB is refused at once, said beforehand or not', async () => {
    const reply = await owner.request('POST', '/api/vessels', { body: JSON.stringify({ name: 'x'.repeat(20_000_000) }) }).catch(() => ({ status: 413 }))
    expect(reply.status).toBe(413)
    const chunk = 'x'.repeat(65_000)
    const answer = await raw(`POST /api/vessels HTTP/1.1\r\nHost: x\r\nSec-Fetch-Site: same-origin\r\nCookie: ${owner.cookie}\r\nContent-Type: application/json\r\nTransfer-Encoding: chunked\r\n\r\n${`${chunk.length.toString(16)}\r\n${chunk}\r\n`.repeat(6)}`)
    expect(answer).toMatch(/^HTTP\/1\.1 413/)
  })

  it('a body that never comes does not hold up others', async () => {
    const slow = raw(`POST /api/vessels HTTP/1.1\r\nHost: x\r\nSec-Fetch-Site: same-origin\r\nCookie: ${owner.cookie}\r\nContent-Type: application/json\r\nContent-Length: 100\r\n\r\n{`, 3000)
    const started = performance.now()
    expect((await owner.get('/api/vessels')).status).toBe(200)
    expect(performance.now() - started).toBeLessThan(2000)
    expect(await slow).toBe('')
  })

  it.each([
    ['two lengths', 'Content-Length: 5\r\nContent-Length: 6\r\n\r\nhello'],
    ['a length and chunks', 'Content-Length: 5\r\nTransfer-Encoding: chunked\r\n\r\n0\r\n\r\n'],
    ['an odd coding', 'Transfer-Encoding: xchunked\r\n\r\n0\r\n\r\n'],
    ['a huge header', `X-Big: ${'x'.repeat(100_000)}\r\n\r\n`],
  ])('%s: refused', async (_, rest) => {
    const answer = await raw(`POST /api/vessels HTTP/1.1\r\nHost: x\r\nSec-Fetch-Site: same-origin\r\nContent-Type: application/json\r\n${rest}`)
    expect(answer).toMatch(/^HTTP\/1\.1 (400|431|501)/)
  })
})

describe('what is written down', () => {
  it('is JSON line by line, without address, name, password, cookie or query', async () => {
    await raw(`GET /api/nothing?token=verysecret HTTP/1.1\r\nHost: x\r\nConnection: close\r\nUser-Agent: x\u001B[31m\r\nReferer: http://x/?token=verysecret\r\nX-Request-Id: 1 admin in\r\n\r\n`)
    const lines = server.printed().trim().split('\n').filter(line => !line.startsWith('Listening'))
    expect(lines.length).toBeGreaterThan(50)
    for (const line of lines) expect(() => JSON.parse(line), line).not.toThrow()
    for (const secret of ['verysecret', 'sallowmere', DEMO_PASSWORD, 'Odile', 'Fe26', server.db.urls.app]) expect(server.printed()).not.toContain(secret)
  })
})
