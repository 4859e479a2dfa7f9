import { v7 as newId } from 'uuid'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { ActRecorded, MovementReversed } from '../../shared/schemas/ledger'
import type { VesselView } from '../../shared/schemas/vessel'
import { signedIn, type Reply } from '../support/visitor'
import { draw, fill, openDesk, read, type Desk } from './desk'

let server: Desk['server']
let owner: Desk['owner']
let hand: Desk['hand']
let idOf: Desk['idOf']
let stackOf: Desk['stackOf']
let aVessel: Desk['aVessel']
beforeAll(async () => {
  ({ server, owner, hand, idOf, stackOf, aVessel } = await openDesk())
})
afterAll(() => server?.stop())

const fields = (reply: Reply) => read<{ errors: { field: string, message: string }[] }>(reply).errors

describe('the demo over the wire', () => {
  it('GET /api/vessels tells each vessel as it is on the demo day', async () => {
    const list = read<VesselView[]>(await owner.get('/api/vessels?on=2026-09-14'))
    const told = list.map(vessel => [vessel.name, vessel.litres, vessel.cohortCount, vessel.meanAgeDays?.toFixed(1) ?? null, vessel.p10AgeDays, vessel.p50AgeDays, vessel.p90AgeDays, vessel.shareOver3Years === null ? null : (vessel.shareOver3Years * 100).toFixed(1), vessel.oldestCohort?.brewCode ?? null, vessel.standing])
    expect(told).toEqual([
      ['Heron', 4000, 15, '781.1', 210, 574, 1771, '22.9', 'FB19-1', 'called'],
      ['Bittern', 2400, 9, '792.8', 154, 518, 1981, '27.2', 'MP18-1', 'resting'],
      ['Coot', 2000, 8, '342.8', 70, 252, 887, '0.0', 'CP24-1', 'resting'],
      ['Moorhen', 1500, 9, '593.7', 84, 448, 1687, '18.9', 'SP22-1', 'resting'],
      ['Grebe', 820, 20, '985.9', 343, 763, 2296, '29.5', 'MP18-1', 'resting'],
      ['Plover', 500, 11, '552.0', 70, 441, 1379, '15.4', 'OR21-1', 'resting'],
      ['Dunlin', 500, 8, '670.1', 196, 560, 1659, '21.0', 'OR22-1', 'resting'],
      ['Curlew', 600, 6, '951.3', 343, 707, 2170, '28.0', 'TD20-1', 'resting'],
      ['Snipe Upper', 225, 9, '846.8', 161, 735, 2198, '30.9', 'SN18-1', 'resting'],
      ['Snipe Middle', 225, 8, '1803.3', 735, 1827, 2926, '77.9', 'SN18-1', 'resting'],
      ['Snipe Lower', 225, 7, '2486.2', 1463, 2926, 2926, '97.6', 'SN18-1', 'resting'],
      ['Teal One', 0, 0, null, null, null, null, null, null, 'dry'],
      ['Teal Two', 213, 2, '604.5', 378, 742, 742, '0.0', 'OR24-4', 'setApart'],
      ['Teal Three', 180, 1, '861.0', 861, 861, 861, '0.0', 'MP24-0', 'resting'],
    ])
    expect(list.find(vessel => vessel.name === 'Teal Three')).toMatchObject({ fruiting: true, gravityWatch: false, overBrim: false, beer: { code: 'MP', name: 'Mere Pale' } })
    expect(list.find(vessel => vessel.name === 'Teal Two')).toMatchObject({ standingReason: 'vinegar; loose bung found, 12 L low', standingSince: '2026-08-24' })
  })

  it('looks back to any day, and forward; the standing stays today’s', async () => {
    const past = read<VesselView[]>(await owner.get('/api/vessels?on=2024-02-01'))
    expect(past.find(vessel => vessel.name === 'Heron')).toMatchObject({ litres: 0, cohortCount: 0, meanAgeDays: null, standing: 'called' })
    expect((await stackOf(idOf('Grebe'), '2024-02-01')).litres).toBe(935)
    expect((await stackOf(idOf('Heron'), '2026-09-21')).meanAgeDays).toBeCloseTo(788.1, 1)
    expect((await stackOf(idOf('Heron'), '1999-01-01'))).toMatchObject({ litres: 0, cohorts: [], meanAgeDays: null })
  })

  it('gives the stack oldest first, with beers found by the codes of the brews', async () => {
    const stack = await stackOf(idOf('Curlew'))
    expect(stack.cohorts.map(cohort => cohort.brewedOn)).toEqual([...stack.cohorts.map(cohort => cohort.brewedOn)].sort())
    expect(stack.cohorts.find(cohort => cohort.brewCode === 'BOUGHT-23')).toMatchObject({ ageBandDays: 180, beerCode: null })
    expect(stack.cohorts[0]).toMatchObject({ brewCode: 'TD20-1', beerCode: 'TD' })
    expect(stack.cohorts.reduce((sum, cohort) => sum + cohort.share, 0)).toBeCloseTo(1, 9)
  })
})

describe('an act', () => {
  it('draw and refill: both are kept, and what they changed is told', async () => {
    const id = await aVessel()
    const act = { id: newId(), note: 'first draw', movements: [draw(id, 250), { ...fill(id, 250, '2026-08-03', '2026-09-07'), method: 'flowMeter' }] }
    const reply = await hand.post('/api/acts', act)
    expect(reply.status).toBe(201)
    const recorded = read<ActRecorded>(reply)
    expect(recorded).toMatchObject({ id: act.id, note: 'first draw', recordedByName: 'Jory Athellow', recordedAt: expect.stringMatching(/^2026-09-14T06:/) })
    expect(recorded.movements.map(movement => [movement.kind, movement.placeInDay])).toEqual([['draw', 3], ['in', 5]])
    expect(recorded.changed).toEqual([{ vesselId: id, before: { litres: 1000, meanAgeDays: 252 }, after: { litres: 1000, meanAgeDays: 0.75 * 252 + 0.25 * 42, volumeDoubt: false, overBrim: false } }])
  })

  it('sent again is found; under the same id with other content it is refused', async () => {
    const id = await aVessel()
    const act = { id: newId(), movements: [draw(id, 100)] }
    const [first, second, other, stolen] = [await hand.post('/api/acts', act), await hand.post('/api/acts', act), await hand.post('/api/acts', { ...act, movements: [{ ...act.movements[0], litres: 101 }] }), await hand.post('/api/acts', { id: newId(), movements: act.movements })]
    expect([first?.status, second?.status, other?.status, stolen?.status]).toEqual([201, 200, 409, 409])
    expect((await stackOf(id)).litres).toBe(900)
  })

  it('sent by two tablets at once is kept once', async () => {
    const id = await aVessel()
    const act = { id: newId(), movements: [draw(id, 100), fill(id, 100, '2026-08-03', '2026-09-07')] }
    const replies = await Promise.all(Array.from({ length: 12 }, (_, n) => (n % 2 ? hand : owner).post('/api/acts', act)))
    expect(replies.map(reply => reply.status).sort()).toEqual([...Array.from({ length: 11 }, () => 200), 201])
    expect((await stackOf(id)).litres).toBe(1000)
  })

  it('two different draws at once that together exceed the volume are both kept, and the mark says so', async () => {
    const id = await aVessel()
    const replies = await Promise.all([hand, owner].map(who => who.post('/api/acts', { id: newId(), movements: [draw(id, 700)] })))
    expect(replies.map(reply => reply.status)).toEqual([201, 201])
    expect(await stackOf(id)).toMatchObject({ litres: 0, volumeDoubt: true, cohorts: [] })
    await owner.post('/api/acts', { id: newId(), movements: [fill(id, 500, '2026-01-05', '2026-03-02')] })
    expect(await stackOf(id)).toMatchObject({ litres: 100, volumeDoubt: false })
  })

  it('more than it holds is kept and marked as over its brim', async () => {
    const id = await aVessel(2500)
    expect(await stackOf(id)).toMatchObject({ litres: 2500, overBrim: true })
  })

  it('back-dated it changes every day after, and none before', async () => {
    const id = await aVessel()
    await hand.post('/api/acts', { id: newId(), movements: [draw(id, 500, '2026-09-07')] })
    await hand.post('/api/acts', { id: newId(), movements: [{ ...draw(id, 500, '2026-05-04'), kind: 'loss', reason: 'leak' }] })
    expect([(await stackOf(id, '2026-05-03')).litres, (await stackOf(id, '2026-05-04')).litres, (await stackOf(id)).litres]).toEqual([1000, 500, 0])
  })

  it.each([
    ['litres below nought', { litres: -1 }, 'litres'],
    ['nought litres', { litres: 0 }, 'litres'],
    ['litres as a text', { litres: '3,41' }, 'litres'],
    ['litres beyond any cellar', { litres: 1e30 }, 'litres'],
    ['four decimals', { litres: 1.0001 }, 'litres'],
    ['less than a thousandth', { litres: 1e-8 }, 'litres'],
    ['nearly a thousandth', { litres: 1.00000001 }, 'litres'],
    ['31 February', { occurredOn: '2026-02-31' }, 'occurredOn'],
    ['tomorrow', { occurredOn: '2026-09-15' }, 'occurredOn'],
    ['1969', { occurredOn: '1969-12-31' }, 'occurredOn'],
    ['a vessel that is none', { vesselId: newId() }, 'vesselId'],
    ['a kind that is none', { kind: 'pour' }, 'kind'],
    ['a field that is none', { colour: 'brown' }, 'colour'],
  ])('%s: a word at the field, nothing kept', async (_, more, field) => {
    const id = await aVessel(100)
    const reply = await hand.post('/api/acts', { id: newId(), movements: [draw(id, 10), { ...draw(id, 10), ...more }] })
    expect(reply.status).toBe(422)
    expect(fields(reply).map(error => error.field)).toEqual([`movements.1.${field}`])
    expect((await stackOf(id)).litres).toBe(100)
  })

  it.each([['0000-01-01'], ['0050-01-01'], ['1899-12-31']])('a brew day of %s is refused', async (brewedOn) => {
    const reply = await hand.post('/api/acts', { id: newId(), movements: [{ ...fill(idOf('Heron'), 1, brewedOn, '2026-09-07') }] })
    expect(reply.status).toBe(422)
  })

  it('may say that it makes no planned draw; a draw, a duty or a beer that is none is told at its field', async () => {
    const id = await aVessel()
    expect((await hand.post('/api/acts', { id: newId(), drawId: null, movements: [draw(id, 1)] })).status).toBe(201)
    const reply = await hand.post('/api/acts', { id: newId(), drawId: newId(), dutyId: newId(), movements: [{ ...fill(id, 1, '2026-08-03', '2026-09-07'), brew: { code: `X${id}`.slice(0, 40), brewedOn: '2026-08-03', beerCode: 'NOPE' } }] })
    expect(fields(reply).map(error => error.field)).toEqual(['movements.0.brew.beerCode', 'drawId', 'dutyId'])
  })

  it('cannot move beer into itself, lose more than moves, rack before brewing, or give a code two days', async () => {
    const id = await aVessel(100)
    const move = { id: newId(), kind: 'move', vesselId: id, litres: 10, occurredOn: '2026-09-07', toVesselId: id, lossLitres: 11 }
    const itself = await hand.post('/api/acts', { id: newId(), movements: [move] })
    expect(fields(itself).map(error => error.field)).toEqual(['movements.0.toVesselId', 'movements.0.lossLitres'])
    const early = await hand.post('/api/acts', { id: newId(), movements: [fill(id, 10, '2026-09-08', '2026-09-07')] })
    expect(fields(early)).toEqual([{ field: 'movements.0.brew.brewedOn', message: 'It cannot be racked before it was brewed.' }])
    const twice = await hand.post('/api/acts', { id: newId(), movements: [{ ...fill(id, 10, '2026-08-03', '2026-09-07'), brew: { code: 'FB19-1', brewedOn: '2026-08-03' } }] })
    expect(fields(twice)).toEqual([{ field: 'movements.0.brew.brewedOn', message: 'Brew FB19-1 was brewed on 2019-02-04. One code has one brew day.' }])
  })

  it('of another brewery is not there, and its vessels and brews cannot be named', async () => {
    const stranger = await signedIn(server.origin, 'owner@quernhollow.example')
    const act = { id: newId(), movements: [draw(await aVessel(), 1)] }
    await owner.post('/api/acts', act)
    expect((await stranger.get(`/api/acts/${act.id}`)).status).toBe(404)
    const [theirs, nobodys] = [await stranger.post('/api/acts', { id: newId(), movements: [draw(idOf('Heron'), 1)] }), await stranger.post('/api/acts', { id: newId(), movements: [draw(newId(), 1)] })]
    expect([theirs?.status, theirs?.text]).toEqual([422, nobodys?.text])
    const heron = (await stackOf(idOf('Heron'))).cohorts[0]
    const [rook] = read<VesselView[]>(await stranger.get('/api/vessels'))
    const named = (id: string) => stranger.post('/api/acts', { id: newId(), movements: [{ id: newId(), kind: 'in', vesselId: rook?.id, litres: 1, occurredOn: '2026-09-07', brew: { id } }] })
    expect((await named(heron?.brewId ?? '')).text).toBe((await named(newId())).text)
  })
})

describe('a reversal', () => {
  it('makes every day as if the line had never been, says what it changed, and hides nothing', async () => {
    const id = await aVessel()
    const wrong = draw(id, 150)
    await hand.post('/api/acts', { id: newId(), movements: [wrong] })
    expect((await hand.post(`/api/movements/${wrong.id}/reverse`, { id: newId(), reason: 'x' })).status).toBe(403)
    const request = { id: newId(), reason: 'typed 150 for 125' }
    const reply = await owner.post(`/api/movements/${wrong.id}/reverse`, request)
    expect(reply.status).toBe(201)
    expect(read<MovementReversed>(reply)).toMatchObject({ id: request.id, movementId: wrong.id, reason: request.reason, reversedByName: 'Odile Varnham', changed: [{ vesselId: id, before: { litres: 850 }, after: { litres: 1000 } }] })
    expect((await owner.post(`/api/movements/${wrong.id}/reverse`, request)).status).toBe(200)
    expect((await owner.post(`/api/movements/${wrong.id}/reverse`, { id: newId(), reason: 'again' })).status).toBe(409)
    expect((await stackOf(id)).litres).toBe(1000)
    const ledger = await owner.get(`/api/vessels/${id}/ledger`)
    expect(ledger.json).toMatchObject({ movements: [{ id: wrong.id, reversal: { reason: request.reason } }, { kind: 'in', reversal: null }] })
    await hand.post('/api/acts', { id: newId(), movements: [draw(id, 125)] })
    expect((await stackOf(id)).litres).toBe(875)
  })

  it('of a whole act strikes out all its lines that still stand', async () => {
    const id = await aVessel()
    const act = { id: newId(), movements: [draw(id, 250), fill(id, 200, '2026-08-03', '2026-09-07')] }
    await hand.post('/api/acts', act)
    await owner.post(`/api/movements/${act.movements[0]?.id}/reverse`, { id: newId(), reason: 'one line' })
    const reply = await owner.post(`/api/acts/${act.id}/reverse`, { id: newId(), reason: 'the rest' })
    expect(reply.status).toBe(201)
    expect(reply.json).toMatchObject({ reversals: [{ movementId: act.movements[1]?.id }] })
    expect((await stackOf(id)).litres).toBe(1000)
    expect((await owner.post(`/api/acts/${act.id}/reverse`, { id: newId(), reason: 'once more' })).status).toBe(409)
  })

  it('under an id that struck out something else is refused, and strikes out nothing', async () => {
    const id = await aVessel()
    const [one, other] = [draw(id, 10), { id: newId(), movements: [draw(id, 20), draw(id, 30)] }]
    await hand.post('/api/acts', { id: newId(), movements: [one] })
    await hand.post('/api/acts', other)
    const request = { id: newId(), reason: 'typed wrong' }
    expect((await owner.post(`/api/movements/${one.id}/reverse`, request)).status).toBe(201)
    expect((await owner.post(`/api/acts/${other.id}/reverse`, request)).status).toBe(409)
    expect((await stackOf(id)).litres).toBe(950)
    const line = { id: newId(), reason: 'one line of two' }
    expect((await owner.post(`/api/movements/${other.movements[0]?.id}/reverse`, line)).status).toBe(201)
    expect((await owner.post(`/api/acts/${other.id}/reverse`, line)).status).toBe(409)
    expect((await stackOf(id)).litres).toBe(970)
  })

  it('of fifty at once one is made', async () => {
    const id = await aVessel()
    const wrong = draw(id, 150)
    await hand.post('/api/acts', { id: newId(), movements: [wrong] })
    const replies = await Promise.all(Array.from({ length: 50 }, () => owner.post(`/api/movements/${wrong.id}/reverse`, { id: newId(), reason: 'race' })))
    expect(replies.filter(reply => reply.status === 201)).toHaveLength(1)
    expect(replies.filter(reply => reply.status === 409)).toHaveLength(49)
  })
})

describe('vessel events', () => {
  it('set a vessel apart and free it again, once each, however often sent', async () => {
    const id = await aVessel()
    const event = { id: newId(), kind: 'setApart', occurredOn: '2026-09-14', reason: 'vinegar' }
    const replies = [await hand.post(`/api/vessels/${id}/events`, event), await hand.post(`/api/vessels/${id}/events`, event), await hand.post(`/api/vessels/${id}/events`, { ...event, reason: 'other' })]
    expect(replies.map(reply => reply.status)).toEqual([201, 200, 409])
    expect((await owner.get(`/api/vessels/${id}`)).json).toMatchObject({ standing: 'setApart', standingReason: 'vinegar' })
    await hand.post(`/api/vessels/${id}/events`, { id: newId(), kind: 'freed', occurredOn: '2026-09-14' })
    expect((await owner.get(`/api/vessels/${id}`)).json).toMatchObject({ standing: 'resting', standingReason: null })
  })

  it('may not come from tomorrow, nor be a verdict', async () => {
    const id = await aVessel()
    expect((await hand.post(`/api/vessels/${id}/events`, { id: newId(), kind: 'setApart', occurredOn: '2026-09-15' })).status).toBe(422)
    expect((await hand.post(`/api/vessels/${id}/events`, { id: newId(), kind: 'called', occurredOn: '2026-09-14' })).status).toBe(422)
  })

  it('a vessel that holds more than before is over its brim before that day, not after', async () => {
    const id = await aVessel(2500, '2026-01-05', '2026-02-02')
    const { version } = read<VesselView>(await owner.get(`/api/vessels/${id}`))
    await owner.patch(`/api/vessels/${id}`, { version, workingLitres: 3000 })
    expect([(await stackOf(id, '2026-09-13')).overBrim, (await stackOf(id)).overBrim]).toEqual([true, false])
  })
})

describe('brews', () => {
  it('tell what is left of each, and where; their beer can be changed', async () => {
    const list = read<{ id: string, code: string, litresNow: number, rackedLitres: number, vessels: { vesselName: string }[], version: number }[]>(await owner.get('/api/brews'))
    const oldest = list.find(brew => brew.code === 'SN18-1')
    expect(oldest).toMatchObject({ rackedLitres: 675, beerCode: 'SN' })
    expect(oldest?.vessels.map(place => place.vesselName)).toEqual(['Grebe', 'Snipe Upper', 'Snipe Middle', 'Snipe Lower'])
    const bought = list.find(brew => brew.code === 'BOUGHT-23')
    expect((await owner.patch(`/api/brews/${bought?.id}`, { version: bought?.version, beerCode: 'TD' })).json).toMatchObject({ beerName: 'Turf Dark', ageBandDays: 180 })
    expect((await owner.patch(`/api/brews/${bought?.id}`, { version: bought?.version, beerCode: null })).status).toBe(409)
    expect((await owner.patch(`/api/brews/${bought?.id}`, { version: 2, beerCode: 'XX' })).status).toBe(422)
  })
})
