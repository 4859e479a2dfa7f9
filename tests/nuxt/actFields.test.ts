import { describe, expect, it } from 'vitest'
import { actBody, actFaults, emptyAct, keepWords } from '~/composables/actFields'

const IDS = { act: 'a', lines: ['one', 'two'] }
const FILLED = { ...emptyAct('2026-09-14'), out: '1000', into: '990.5', lot: 'P26-08', brewCode: 'FB26-2', brewedOn: '2026-08-10' }

describe('an act as it is sent', () => {
  it('is two lines for a draw and its refill, under ids of their own', () => {
    expect(actBody('draw', 'heron', FILLED, IDS)).toEqual({
      id: 'a',
      movements: [
        { id: 'one', kind: 'draw', vesselId: 'heron', occurredOn: '2026-09-14', litres: 1000, lot: 'P26-08' },
        { id: 'two', kind: 'in', vesselId: 'heron', occurredOn: '2026-09-14', litres: 990.5, brew: { code: 'FB26-2', brewedOn: '2026-08-10' } },
      ],
    })
  })

  it('is one line while nothing goes in, and leaves out what was left open', () => {
    expect(actBody('draw', 'heron', { ...FILLED, into: ' ', lot: '' }, IDS)).toEqual({ id: 'a', movements: [{ id: 'one', kind: 'draw', vesselId: 'heron', occurredOn: '2026-09-14', litres: 1000 }] })
  })

  it('sends what is no number as it was typed', () => {
    expect(actBody('loss', 'heron', { ...FILLED, out: 'a lot', reason: 'lees' }, IDS)).toMatchObject({ movements: [{ litres: 'a lot', reason: 'lees' }] })
  })
})

describe('the faults of an act', () => {
  it('stand at the fields of its form', () => {
    const faults = ['movements.0.litres', 'movements.1.litres', 'movements.1.brew.brewedOn', 'movements.1.brew', 'movements.0.occurredOn', 'note'].map(field => ({ field, message: '' }))
    expect(actFaults('draw', FILLED, faults).map(({ field }) => field)).toEqual(['out', 'into', 'brewedOn', 'brewedOn', 'occurredOn', 'note'])
    expect(actFaults('fill', { ...FILLED, brewCode: '' }, [{ field: 'movements.0.brew', message: '' }])[0]?.field).toBe('brewCode')
  })
})

it('repeats the numbers on the button that keeps it', () => {
  expect(keepWords('draw', FILLED)).toBe('Keep 1,000 out, 990.5 in')
  expect(keepWords('draw', { ...FILLED, into: '' })).toBe('Keep 1,000 out')
  expect(keepWords('loss', emptyAct('2026-09-14'))).toBe('Keep the act')
})
