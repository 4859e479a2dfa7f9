import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { isPortFree } from '../../scripts/lib/ports'
import { isGoneWithin } from '../../scripts/lib/processes'
import { begin, clearPlace, newPlace, postgresOf, serverOf, signIn, stop, type Place, type Started } from './started'

/** A start builds first if the sources have changed since the last build. */
const FIRST_START = 240_000
const SECOND_START = 10_000
const KILLED_START = 40_000

let place: Place
let started: Started

beforeAll(async () => {
  place = await newPlace()
  started = begin(place)
  await started.running
}, FIRST_START)

afterAll(async () => {
  await stop(started)
  clearPlace(place)
}, KILLED_START)

describe('while it runs', () => {
  it('lets the demo\'s people in', async () => {
    expect(await signIn(place, started.output())).toBe(200)
  })

  it('refuses a second start from the same folder and says where the first is', async () => {
    const second = begin({ ...place, port: place.port + 1 })
    expect(await second.ended).toBe(1)
    expect(second.output()).toContain(`Undercroft already runs from this folder at http://localhost:${place.port}  (process ${started.mark.pid}).`)
  })

  it('names a port that is taken', async () => {
    const other = { ...await newPlace(), port: place.port }
    const second = begin(other)
    expect(await second.ended).toBe(1)
    expect(second.output()).toContain(`Port ${place.port} on 127.0.0.1 is taken by another program.`)
    clearPlace(other)
  })

  it('runs beside another, empty one, whose folder lies where other users can\'t go', async () => {
    const closed = mkdtempSync(join(tmpdir(), 'undercroft-closed-'))
    const other = await newPlace(closed)
    const beside = begin(other, { UNDERCROFT_DEMO: 'none' })
    await beside.running
    expect(beside.output()).toMatch(/set it up with this one-time code:\n\n {2}\S+/)
    expect(await signIn(place, started.output())).toBe(200)
    await stop(beside)
    clearPlace(other)
    rmSync(closed, { recursive: true })
  }, KILLED_START)
})

describe('after kill -9', () => {
  async function servesAgain(): Promise<void> {
    const began = Date.now()
    started = begin(place)
    await started.running
    expect(Date.now() - began).toBeLessThan(SECOND_START)
    expect(await signIn(place, started.output())).toBe(200)
  }

  it('of itself: server and PostgreSQL end too, and the next start serves', async () => {
    const parts = [serverOf(place), postgresOf(place)]
    process.kill(started.mark.pid, 'SIGKILL')
    await started.ended
    for (const part of parts) expect(await isGoneWithin(part, 10_000)).toBe(true)
    await servesAgain()
  }, KILLED_START)

  it('of itself: a start at the very next moment serves', async () => {
    process.kill(started.mark.pid, 'SIGKILL')
    await servesAgain()
  }, KILLED_START)

  it.each([
    ['the server', 'The server stopped by itself (SIGKILL)', serverOf],
    ['PostgreSQL', 'PostgreSQL stopped by itself (SIGKILL)', postgresOf],
  ])('of %s: it says so and ends, and the next start serves', async (_, words, victimIn) => {
    process.kill(victimIn(place).pid, 'SIGKILL')
    expect(await started.ended).toBe(1)
    expect(started.output()).toContain(words)
    await servesAgain()
  }, KILLED_START)
})

it('leaves nothing behind when it is asked to stop, even twice', async () => {
  const parts = [serverOf(place), postgresOf(place)]
  process.kill(started.mark.pid, 'SIGTERM')
  process.kill(started.mark.pid, 'SIGINT')
  expect(await started.ended).toBe(0)
  for (const part of parts) expect(await isGoneWithin(part, 0)).toBe(true)
  expect(await isPortFree(place.port, '127.0.0.1')).toBe(true)

  started = begin(place)
  await started.running
}, KILLED_START)
