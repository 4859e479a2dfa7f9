import { expect, it } from 'vitest'
import { announcement } from '../../../scripts/lib/announce'

const address = 'http://localhost:3000'

it('names the address and how to stop', () => {
  expect(announcement(address, undefined)).toBe('\nUndercroft runs at http://localhost:3000\n\nCtrl-C stops it.')
})

it('lists the demo\'s people and their password', () => {
  const words = announcement(address, { password: 'sallowmere-cellar', signIns: [
    { email: 'ada@example.test', role: 'owner', brewery: 'Sallowmere' },
    { email: 'benedict@example.test', role: 'taster', brewery: 'Sallowmere' },
  ] })
  expect(words).toContain('password sallowmere-cellar')
  expect(words).toContain('  ada@example.test       owner, Sallowmere\n  benedict@example.test  taster, Sallowmere')
})

it('never tells the demo\'s password where the database holds somebody\'s own data', () => {
  expect(announcement(address, { password: 'sallowmere-cellar', signIns: [] })).not.toContain('sallowmere-cellar')
})

it('gives the one-time code of an empty installation with its time', () => {
  const words = announcement(address, { code: 'KEG-42', until: new Date('2026-09-14T09:00:00Z') })
  expect(words).toContain('  KEG-42')
  expect(words).toContain('2026-09-14T09:00:00.000Z')
})
