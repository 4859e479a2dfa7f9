import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { startServer, type TestServer } from '../support/server'
import { visitor, type Reply } from '../support/visitor'

let server: TestServer
beforeAll(async () => {
  server = await startServer({ demo: false })
})
afterAll(() => server?.stop())

const form = (more: Record<string, unknown> = {}) => ({
  code: server.setUpCode, breweryName: 'Marl & Reed', timeZone: 'Europe/Oslo', name: 'Ragna Holt', email: 'ragna@marlreed.example', password: 'three plain words', ...more,
})
const setUp = (more: Record<string, unknown>) => visitor(server.origin).post('/api/set-up', form(more))
const messagesOf = (reply: Reply) => (reply.json as { errors: { field: string, message: string }[] }).errors

describe('an empty installation', () => {
  it('says that it is open, and is healthy', async () => {
    expect((await visitor(server.origin).get('/api/set-up')).json).toEqual({ open: true, codeGoodUntil: '2026-09-14T07:00:00.000Z' })
    expect((await visitor(server.origin).get('/api/health')).json).toEqual({ status: 'ok', database: 'ok', migrations: 'ok', mailQueue: null, lastDerivedAt: null })
  })

  it.each([
    ['a code that is wrong', { code: 'AAAA BBBB CCCC' }, 'code'],
    ['no code', { code: '' }, 'code'],
    ['a short password', { password: 'ninesigns' }, 'password'],
    ['a password that everybody tries', { password: 'password123' }, 'password'],
    ['one of the most used with figures behind', { password: 'qwertyuiop2026!' }, 'password'],
    ['one sign over and over', { password: 'aaaaaaaaaaaa' }, 'password'],
    ['the own address as password', { password: 'ragna@marlreed.example' }, 'password'],
    ['a time zone that is none', { timeZone: 'Europe/Atlantis' }, 'timeZone'],
    ['an offset for a time zone', { timeZone: '+02:00' }, 'timeZone'],
    ['an address that is none', { email: 'ragna at marlreed' }, 'email'],
    ['an address with a comment', { email: 'ragna@marlreed.example(x)evil.example' }, 'email'],
    ['a name with a line break', { name: 'Ragna\r\nBcc: x@y.example' }, 'name'],
  ])('refuses %s at its field', async (_, more, field) => {
    const reply = await setUp(more)
    expect(reply.status).toBe(422)
    expect(messagesOf(reply).map(error => error.field)).toEqual([field])
    expect(messagesOf(reply)[0]?.message).toMatch(/^[A-Z].*\.$/)
  })

  it('is set up once, by one of ten who try together, who is signed in', async () => {
    const replies = await Promise.all(Array.from({ length: 10 }, (_, n) => {
      const who = visitor(server.origin)
      return who.post('/api/set-up', form({ code: ` ${server.setUpCode?.toLowerCase().replaceAll(' ', '-')} `, email: `ragna${n}@marlreed.example` })).then(reply => ({ reply, who }))
    }))
    const made = replies.filter(({ reply }) => reply.status === 201)
    expect(made).toHaveLength(1)
    expect(replies.filter(({ reply }) => reply.status !== 201).every(({ reply }) => reply.status === 404 || reply.status === 422)).toBe(true)
    expect((await made[0]?.who.get('/api/me'))?.json).toMatchObject({ brewery: { name: 'Marl & Reed', timeZone: 'Europe/Oslo', today: '2026-09-14' }, role: 'owner' })
    expect((await made[0]?.who.get('/api/vessels'))?.json).toEqual([])
    expect(await server.db.asSuperuser('select name from breweries')).toEqual([{ name: 'Marl & Reed' }])
  })

  it('is closed from then on', async () => {
    expect((await visitor(server.origin).get('/api/set-up')).json).toEqual({ open: false, codeGoodUntil: null })
    expect((await setUp({})).status).toBe(404)
  })
})

describe('the code', () => {
  it('is worth ten tries, and an hour', async () => {
    const other = await startServer({ demo: false })
    try {
      const guess = () => visitor(other.origin).post('/api/set-up', { ...form(), code: 'AAAA BBBB CCCC' })
      for (let n = 0; n < 10; n++) expect((await guess()).status).toBe(422)
      expect((await guess()).status).toBe(429)
    }
    finally {
      await other.stop()
    }
    const stale = await startServer({ demo: false, env: { UNDERCROFT_NOW: '2026-09-14T07:00:01.000Z' } })
    try {
      expect((await visitor(stale.origin).get('/api/set-up')).json).toEqual({ open: true, codeGoodUntil: null })
      expect((await visitor(stale.origin).post('/api/set-up', { ...form(), code: stale.setUpCode })).status).toBe(422)
    }
    finally {
      await stale.stop()
    }
  })

  it('takes passwords of 64 and 128 signs, of any script, with spaces, and with a NUL', async () => {
    for (const password of ['wort'.repeat(16), 'long words '.repeat(11) + 'and more', '  mein längstes Wört  ', 'ключи от погреба', 'cellar\u0000keys\u0000here']) {
      const fresh = await startServer({ demo: false })
      try {
        const email = 'ragna@marlreed.example'
        expect((await visitor(fresh.origin).post('/api/set-up', { ...form(), code: fresh.setUpCode, password })).status, password).toBe(201)
        expect((await visitor(fresh.origin).post('/api/auth/sign-in', { email, password })).status, password).toBe(200)
        expect((await visitor(fresh.origin).post('/api/auth/sign-in', { email, password: `${password}x` })).status, password).toBe(401)
      }
      finally {
        await fresh.stop()
      }
    }
  })
})
