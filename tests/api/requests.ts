import { v7 as newId } from 'uuid'
import type { ROUTES } from '../../shared/schemas/routes'
import { DEMO_PASSWORD } from '../../dev/loadDemo'

/** What a sample request may point at. */
export interface Around {
  vesselId: string
  breweryId: string
}

export interface Sample {
  path: string
  body?: unknown
}

/** For each route a request that succeeds for whoever may make it. A route without a line here does not compile. */
export const SAMPLES: Record<keyof typeof ROUTES, (around: Around) => Sample> = {
  health: () => ({ path: '/api/health' }),
  openApi: () => ({ path: '/api/openapi.json' }),
  setUpState: () => ({ path: '/api/set-up' }),
  setUp: () => ({ path: '/api/set-up', body: { code: 'AAAA BBBB CCCC', breweryName: 'Another', timeZone: 'Europe/Oslo', name: 'Nobody', email: 'nobody@another.example', password: 'a few plain words' } }),
  signIn: () => ({ path: '/api/auth/sign-in', body: { email: 'lead@sallowmere.example', password: DEMO_PASSWORD } }),
  signOut: () => ({ path: '/api/auth/sign-out', body: {} }),
  signOutEverywhere: () => ({ path: '/api/auth/sign-out-everywhere', body: {} }),
  chooseBrewery: ({ breweryId }) => ({ path: '/api/auth/brewery', body: { breweryId } }),
  me: () => ({ path: '/api/me' }),
  listVessels: () => ({ path: '/api/vessels?on=2026-09-14' }),
  createVessel: () => {
    const id = newId()
    return { path: '/api/vessels', body: { id, name: `Sample ${id}`, kind: 'barrel', workingLitres: 225 } }
  },
  changeVessel: ({ vesselId }) => ({ path: `/api/vessels/${vesselId}`, body: { version: 1 } }),
  removeVessel: ({ vesselId }) => ({ path: `/api/vessels/${vesselId}?version=1` }),
}
