import { createPinia, setActivePinia } from 'pinia'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { UNDO_SECONDS, useUndoStore } from '~/stores/undo'

const anOffer = (subject: string, undo = vi.fn(() => Promise.resolve())) => ({ subject, words: 'is kept.', undo, undone: `${subject} is as before.` })

describe('the undo at the foot of the page', () => {
  beforeEach(() => {
    vi.useFakeTimers()
    setActivePinia(createPinia())
  })
  afterEach(() => vi.useRealTimers())

  it('stands for ten seconds and counts them down', () => {
    const store = useUndoStore()
    store.offerUndo(anOffer('Heron'))
    expect(store.secondsLeft).toBe(UNDO_SECONDS)
    vi.advanceTimersByTime(9_000)
    expect(store.secondsLeft).toBe(1)
    expect(store.offer?.subject).toBe('Heron')
    vi.advanceTimersByTime(1_000)
    expect(store.offer).toBeNull()
  })

  it('gives way to a newer act, which has its own ten seconds', () => {
    const store = useUndoStore()
    store.offerUndo(anOffer('Heron'))
    vi.advanceTimersByTime(7_000)
    store.offerUndo(anOffer('Bittern'))
    vi.advanceTimersByTime(5_000)
    expect(store.offer?.subject).toBe('Bittern')
    expect(store.secondsLeft).toBe(5)
  })

  it('waits while a person is on it', () => {
    const store = useUndoStore()
    store.offerUndo(anOffer('Heron'))
    store.held = true
    vi.advanceTimersByTime(60_000)
    expect(store.secondsLeft).toBe(UNDO_SECONDS)
  })

  it('takes back once, however often it is pressed, and says so', async () => {
    const store = useUndoStore()
    const offer = anOffer('Heron')
    store.offerUndo(offer)
    await Promise.all([store.take(), store.take()])
    expect(offer.undo).toHaveBeenCalledOnce()
    expect(store.offer).toBeNull()
    expect(store.outcome).toBe('Heron is as before.')
    vi.advanceTimersByTime(10_000)
    expect(store.outcome).toBeNull()
  })

  it('says so when it could not be taken back', async () => {
    const store = useUndoStore()
    store.offerUndo(anOffer('Heron', vi.fn(() => Promise.reject(new Error('stale')))))
    await store.take()
    expect(store.outcome).toMatch(/^Heron could not be put back/)
  })
})
