import { describe, expect, it } from 'vitest'
import type { MovementView, VesselLedger } from '#shared/schemas/ledger'
import { ledgerActs, matches } from '~/composables/ledgerLines'

const HERON = '0190a000-0000-7000-8000-000000000010'
const COOT = '0190a000-0000-7000-8000-000000000011'
const PLAIN = { position: 0, vesselId: HERON, vesselName: 'Heron', placeInDay: 0, method: null, note: null, brew: null, lot: null, toVesselId: null, toVesselName: null, lossLitres: null, reason: null, reversal: null }
const line = (id: string, actId: string, occurredOn: string, given: Partial<MovementView>): MovementView => ({ ...PLAIN, id, actId, occurredOn, kind: 'draw', litres: 0, ...given })

/** Newest first, as it is told. */
const LEDGER: VesselLedger = {
  notes: [],
  acts: [{ id: 'b', note: 'on time', recordedAt: '2026-03-23T10:00:00Z', recordedByName: 'Bram' }],
  movements: [
    line('5', 'c', '2026-04-01', { kind: 'loss', litres: 40, reason: 'leak', reversal: { id: 'r', movementId: '5', reason: 'was Coot', reversedAt: '2026-04-02T10:00:00Z', reversedById: 'x', reversedByName: 'Bram' } }),
    line('4', 'b', '2026-03-23', { kind: 'in', litres: 900, brew: { id: 'x', code: 'FB26-1', brewedOn: '2026-02-16' } }),
    line('3', 'b', '2026-03-23', { litres: 1000, lot: 'P26-01' }),
    line('2', 'a', '2025-01-02', { kind: 'move', litres: 210, lossLitres: 10, vesselId: COOT, vesselName: 'Coot', toVesselId: HERON, toVesselName: 'Heron' }),
    line('1', 'a', '2025-01-02', { kind: 'in', litres: 3800, brew: { id: 'y', code: 'FB24-1', brewedOn: '2024-12-01' } }),
  ],
}

describe('the ledger of a vessel', () => {
  const acts = ledgerActs(LEDGER, HERON)

  it('stands by acts, the newest first, and the lines of an act in the order in which they were done', () => {
    expect(acts.map(({ id, rows }) => [id, rows.map(({ word }) => word)])).toEqual([['c', ['Loss']], ['b', ['Draw', 'Refill']], ['a', ['Fill', 'Moved in']]])
    expect(acts[1]).toMatchObject({ note: 'on time', recordedByName: 'Bram' })
  })

  it('tells after each line what is in the vessel; what is struck out changes nothing', () => {
    expect(acts.flatMap(({ rows }) => rows.map(({ change, then }) => [change, then]))).toEqual([[-40, null], [-1000, 3000], [900, 3900], [3800, 3800], [200, 4000]])
  })

  it('says of each line what it was', () => {
    expect(acts.flatMap(({ rows }) => rows.map(({ what }) => what))).toEqual(['leak', 'to run P26-01', 'FB26-1, brewed 16 February 2026', 'FB24-1, brewed 1 December 2024', 'from Coot, 10\u00A0L lost on the way'])
  })

  it('is found by kind and by words, also those of a reversal', () => {
    const found = (kind: Parameters<typeof matches>[1], text: string) => acts.flatMap(({ rows }) => rows.filter(row => matches(row, kind, text)).map(row => row.line.id))
    expect(found('in', '')).toEqual(['4', '1'])
    expect(found('', 'p26-01')).toEqual(['3'])
    expect(found('', 'Coot')).toEqual(['5', '2'])
  })
})
