import { expect, it } from 'vitest'
import { readSettings } from '../../server/utils/settings'

it('has a default for everything that a start on one’s own machine needs', () => {
  expect(readSettings({})).toMatchObject({ port: 3000, host: '127.0.0.1', origin: 'http://localhost:3000', secure: false, demo: 'none', trustedProxies: 0 })
})

it('follows the port, and keeps only the origin of an address', () => {
  expect(readSettings({ PORT: '3100' }).origin).toBe('http://localhost:3100')
  expect(readSettings({ UNDERCROFT_ORIGIN: 'https://cellar.example/sign-in' })).toMatchObject({ origin: 'https://cellar.example', secure: true })
})

it('treats an empty variable like one that is not there', () => {
  expect(readSettings({ PORT: '', DATABASE_URL: '' })).toMatchObject({ port: 3000, databaseUrl: undefined })
})

it.each([
  [{ PORT: 'eighty' }, 'PORT'],
  [{ PORT: '70000' }, 'PORT'],
  [{ UNDERCROFT_NOW: 'yesterday' }, 'UNDERCROFT_NOW'],
  [{ NUXT_SESSION_PASSWORD: 'short' }, 'NUXT_SESSION_PASSWORD'],
  [{ DATABASE_URL: 'mysql://x' }, 'DATABASE_URL'],
  [{ UNDERCROFT_DEMO: 'yes' }, 'UNDERCROFT_DEMO'],
  [{ UNDERCROFT_DEMO: 'load', HOST: '0.0.0.0' }, 'UNDERCROFT_DEMO'],
  [{ UNDERCROFT_DEMO: 'load', UNDERCROFT_ORIGIN: 'https://cellar.example' }, 'UNDERCROFT_DEMO'],
])('names the variable that is wrong in %j, and not its value', (environment, variable) => {
  expect(() => readSettings(environment)).toThrow(variable)
  expect(() => readSettings({ ...environment, NUXT_SESSION_PASSWORD: 'secret' })).not.toThrow('secret')
})
