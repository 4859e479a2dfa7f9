import { v7 as newId } from 'uuid'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { ImportReport } from '../../shared/schemas/ledger'
import type { VesselView } from '../../shared/schemas/vessel'
import { startServer } from '../support/server'
import { signedIn, type Reply, type Visitor } from '../support/visitor'
import { draw, openDesk, read, type Desk } from './desk'

let server: Desk['server']
let owner: Desk['owner']
let hand: Desk['hand']
let vessels: Desk['vessels']
let idOf: Desk['idOf']
let stackOf: Desk['stackOf']
let aVessel: Desk['aVessel']
beforeAll(async () => {
  ({ server, owner, hand, vessels, idOf, stackOf, aVessel } = await openDesk())
})
afterAll(() => server?.stop())

describe('a ledger file', () => {
  const send = (who: Visitor, text: string, query = '') => who.request('POST', `/api/ledger/import${query}`, { body: text, headers: { 'content-type': 'text/csv' } })
  const report = (reply: Reply) => read<ImportReport>(reply)

  it('written out and read into another brewery gives the same ledger', async () => {
    const other = await startServer()
    try {
      const there = await signedIn(other.origin, 'owner@quernhollow.example')
      for (const vessel of vessels.values()) await there.post('/api/vessels', { id: newId(), name: vessel.name, kind: vessel.kind, workingLitres: vessel.workingLitres, wood: vessel.wood })
      const here = await signedIn(other.origin, 'owner@sallowmere.example')
      const heron = read<VesselView[]>(await here.get('/api/vessels')).find(vessel => vessel.name === 'Heron')
      const wrong = { ...draw(heron?.id ?? '', 1), note: '=1+1 "quoted"; and\nbroken', lot: '-7' }
      await here.post('/api/acts', { id: newId(), note: '@all', movements: [wrong] })
      await here.post(`/api/movements/${wrong.id}/reverse`, { id: newId(), reason: '+wrong' })
      const file = (await here.get('/api/ledger.csv')).text
      expect(report(await send(there, file))).toMatchObject({ kept: true, movements: 221, notes: 6, reversals: 1, errors: [] })
      const facts = async (who: Visitor) => read<VesselView[]>(await who.get('/api/vessels?layers=true')).filter(vessel => vessel.name !== 'Rook').map(({ name, litres, meanAgeDays, layers }) => ({ name, litres, meanAgeDays, layers: layers?.map(({ brewCode, share }) => ({ brewCode, share })) }))
      expect(await facts(there)).toEqual(await facts(here))
      const again = (await there.get('/api/ledger.csv')).text.split('\r\n').filter(line => !line.includes(';Rook;'))
      // The beers of the two breweries are their own; all else is the same to the letter.
      const bare = (lines: string[]) => lines.map(line => line.replace(/;(?:FB|MP|CP|SP|OR|TD|SN)(?=;[0-9a-f]{8}-)/, ';'))
      expect(bare(again)).toEqual(bare(file.split('\r\n')))
      expect(report(await send(there, file))).toMatchObject({ kept: true, errors: [] })
      expect(await facts(there)).toEqual(await facts(here))
    }
    finally {
      await other.stop()
    }
  })

  it('makes text inert that a spreadsheet would run, and leaves numbers alone', async () => {
    const id = await aVessel()
    const note = '=HYPERLINK("http://evil.example")'
    await hand.post('/api/acts', { id: newId(), note: '+1', movements: [{ ...draw(id, 1.5), note, lot: '@run' }] })
    const reply = await (await signedIn(server.origin, 'auditor@sallowmere.example')).get('/api/ledger.csv')
    expect(reply.headers.get('content-type')).toMatch(/^text\/csv/)
    const line = reply.text.split('\r\n').find(text => text.includes('evil')) ?? ''
    expect(line).toContain(`;1.5;'@run;`)
    expect(line).toContain(`"'=HYPERLINK(""http://evil.example"")"`)
    expect(line).toContain(`;'+1;`)
  })

  it('takes semicolons and commas, decimal comma and point, CRLF and a byte order mark', async () => {
    const name = (await owner.get(`/api/vessels/${await aVessel(0)}`).then(reply => read<VesselView>(reply))).name
    const files = [`\uFEFFdate;act;vessel;litres;target;brewed\r\n2026-03-02;in;${name};12,5;A-${name.slice(-6)};2026-02-02\r\n`, `date,act,vessel,litres,target,brewed\n2026-03-03,in,${name},"12,5",B-${name.slice(-6)},2026-02-02\n2026-03-04,in,${name.toUpperCase()},1.125,C-${name.slice(-6)},2026-02-02`]
    for (const file of files) expect(report(await send(owner, file))).toMatchObject({ kept: true, errors: [] })
    const found = read<VesselView[]>(await owner.get('/api/vessels')).find(vessel => vessel.name === name)
    expect(found?.litres).toBeCloseTo(26.125, 9)
    expect(report(await send(owner, files[0] ?? ''))).toMatchObject({ kept: true })
    expect((await stackOf(found?.id ?? '')).litres).toBeCloseTo(26.125, 9)
  })

  it('names every bad line by number, column and reason, and keeps none', async () => {
    const good = Array.from({ length: 55 }, (_, n) => `2026-03-02;loss;Heron;1;;;;evaporation;;;line ${n}`)
    const bad = ['2026-03-02;draw;Herron;1', '2026-02-31;draw;Heron;1', '2026-03-02;pour;Heron;1', '2026-03-02;draw;Heron;-1', '2026-03-02;draw;Heron;1,000', '2026-03-02;move;Heron;5;Heron;;6', '2026-03-02;in;Heron;5;FB19-1;2020-01-01', '2026-03-02;in;Heron;5;NEW-1;2026-03-03', '2026-03-02;loss;Heron;5', '2027-03-02;draw;Heron;1', '2026-03-02;draw;Heron;NaN']
    const file = ['date;act;vessel;litres;target;brewed;lossOnWay;reason;method;ageBand;note', ...good, ...bad].join('\n')
    const before = (await stackOf(idOf('Heron'))).litres
    for (const query of ['?dryRun=true', '']) {
      const reply = await send(owner, file, query)
      expect(reply.status).toBe(query ? 200 : 422)
      expect(report(reply)).toMatchObject({ lines: 66, kept: false })
      expect(report(reply).errors.map(({ line, column }) => [line, column])).toEqual([[57, 'vessel'], [58, 'date'], [59, 'act'], [60, 'litres'], [61, 'litres'], [62, 'target'], [62, 'lossOnWay'], [63, 'brewed'], [64, 'brewed'], [65, 'reason'], [66, 'date'], [67, 'litres']])
      expect(report(reply).errors[0]?.message).toBe('No vessel here is named Herron.')
    }
    expect((await stackOf(idOf('Heron'))).litres).toBe(before)
  })

  it.each([
    ['nothing', '', 1, ''],
    ['a head that is none of ours', 'date;act;vessel;colour\n', 1, 'colour'],
    ['a head without what is needed', 'date;litres\n', 1, 'act'],
    ['a quotation mark that is never closed', 'date;act;vessel;note\n2026-03-02;note;Heron;"open', 2, ''],
  ])('says what is wrong with %s', async (_, file, line, column) => {
    expect(report(await send(owner, file, '?dryRun=1')).errors[0]).toMatchObject({ line, column })
  })

  it('adds no line to an act that is kept, gives no place twice, and keeps no id with another meaning', async () => {
    const id = await aVessel()
    const name = read<VesselView>(await owner.get(`/api/vessels/${id}`)).name
    const act = { id: newId(), movements: [draw(id, 1)] }
    await hand.post('/api/acts', act)
    const into = (kind: string, more: string) => send(owner, `date;kind;vessel;litres;act;position;id;reason\n2026-09-07;${kind};${name};1;${more}`, '?dryRun')
    expect(report(await into('draw', `${act.id};7;;`)).errors).toMatchObject([{ line: 2, column: 'actId' }])
    const fresh = newId()
    expect(report(await into('draw', `${fresh};0;;\n2026-09-07;draw;${name};1;${fresh};0;;`)).errors).toMatchObject([{ line: 3, column: 'position' }])
    const lost = { id: newId(), kind: 'loss', vesselId: id, litres: 1, occurredOn: '2026-09-07', reason: 'leak' }
    const losing = { id: newId(), movements: [lost] }
    await hand.post('/api/acts', losing)
    expect(report(await into('loss', `${losing.id};0;${lost.id};dumped`)).errors).toMatchObject([{ line: 2, column: 'id' }])
    expect(report(await into('loss', `${losing.id};0;${lost.id};leak`)).errors).toEqual([])
  })

  it('a dry run keeps nothing', async () => {
    const before = (await owner.get('/api/ledger.csv')).text
    expect(report(await send(owner, 'date;act;vessel;litres\n2026-03-02;draw;Heron;1\n', '?dryRun=true'))).toMatchObject({ kept: false, movements: 1, errors: [] })
    expect((await owner.get('/api/ledger.csv')).text).toBe(before)
  })

  it('of a hundred thousand lines is taken with its progress told', async () => {
    const id = await aVessel(0)
    const name = read<VesselView>(await owner.get(`/api/vessels/${id}`)).name
    const lines = Array.from({ length: 100_000 }, (_, n) => n % 2 ? `2020-01-${String(n % 28 + 1).padStart(2, '0')};draw;${name};1` : `2020-01-${String(n % 28 + 1).padStart(2, '0')};in;${name};2;BIG-${n % 400};2019-01-01`)
    const reply = await owner.request('POST', '/api/ledger/import', { body: ['date;act;vessel;litres;target;brewed', ...lines].join('\n'), headers: { 'content-type': 'text/csv', 'accept': 'application/x-ndjson' } })
    const told = reply.text.trim().split('\n').map(text => JSON.parse(text))
    expect(told.at(-1)).toMatchObject({ kept: true, movements: 100_000, errors: [] })
    expect(told.length).toBeGreaterThan(100)
    expect(told[0]).toEqual({ line: 501 })
    expect((await stackOf(id)).litres).toBeCloseTo(50_000, 3)
    const ledger = await owner.get(`/api/vessels/${id}/ledger`)
    expect(ledger.status).toBe(200)
    const [first] = read<{ movements: { actId: string }[] }>(ledger).movements
    expect((await owner.post(`/api/acts/${first?.actId}/reverse`, { id: newId(), reason: 'the whole day' })).status).toBe(201)
  }, 120_000)

  it('is for leads to bring in, and for auditors to take out', async () => {
    expect((await send(hand, 'date;act;vessel\n')).status).toBe(403)
    expect((await hand.get('/api/ledger.csv')).status).toBe(403)
    expect((await owner.request('POST', '/api/ledger/import', { body: 'x', headers: { 'content-type': 'application/json' } })).status).toBe(415)
  })
})
