import { afterAll, beforeAll, expect, it } from 'vitest'
import { recordAttempt, requireFewFailures, type Attempt } from '../../server/commands/attempts'
import { withoutBrewery } from '../../server/database/door'
import { keyedHash } from '../../server/security/secrets'
import { freshDatabase, type TestDatabase } from '../support/database'

let db: TestDatabase
beforeAll(async () => {
  db = await freshDatabase()
})
afterAll(() => db?.drop())

const start = Date.parse('2026-09-14T06:00:00Z')
const at = (minutes: number) => new Date(start + minutes * 60_000)
const attempt = (account: string, address: string): Attempt => ({ kind: 'signIn', accountHash: keyedHash('k', account), addressHash: keyedHash('k', address) })
const fail = (account: string, address: string, minutes: number) => withoutBrewery(db.database, tx => recordAttempt(tx, attempt(account, address), false, at(minutes)))
const succeed = (account: string, address: string, minutes: number) => withoutBrewery(db.database, tx => recordAttempt(tx, attempt(account, address), true, at(minutes)))
const mayTry = (account: string, address: string, minutes: number) => withoutBrewery(db.database, tx => requireFewFailures(tx, attempt(account, address), at(minutes))).then(() => true)

it('stops one address on one account after ten failures, and lets another address in', async () => {
  for (let n = 0; n < 10; n++) {
    expect(await mayTry('bram', 'cafe', n / 10)).toBe(true)
    await fail('bram', 'cafe', n / 10)
  }
  await expect(mayTry('bram', 'cafe', 1)).rejects.toMatchObject({ code: 'tooMany', retryAfterSeconds: 14 * 60 })
  expect(await mayTry('bram', 'home', 1)).toBe(true)
})

it('lets go by itself after a quarter of an hour', async () => {
  expect(await mayTry('bram', 'cafe', 16)).toBe(true)
})

it('stops one address that tries one password on many accounts', async () => {
  for (let n = 0; n < 50; n++) await fail(`person ${n}`, 'spray', 100)
  await expect(mayTry('person 51', 'spray', 101)).rejects.toMatchObject({ code: 'tooMany' })
  expect(await mayTry('person 51', 'elsewhere', 101)).toBe(true)
})

it('slows one account tried from many addresses, but never shuts its owner out from where they came in before', async () => {
  await succeed('odile', 'brewery', 190)
  for (let n = 0; n < 100; n++) await fail('odile', `bot ${n}`, 200)
  await expect(mayTry('odile', 'bot 200', 201)).rejects.toMatchObject({ code: 'tooMany' })
  expect(await mayTry('odile', 'brewery', 201)).toBe(true)
})

it('does not count what went right', async () => {
  for (let n = 0; n < 60; n++) await succeed('jory', 'tablet', 300)
  expect(await mayTry('jory', 'tablet', 301)).toBe(true)
})
