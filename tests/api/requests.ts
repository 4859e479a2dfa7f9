import { v7 as newId } from 'uuid'
import type { ROUTES } from '../../shared/schemas/routes'
import { DEMO_PASSWORD } from '../../dev/loadDemo'

/** What a sample request may point at. */
export interface Around {
  vesselId: string
  breweryId: string
  actId: string
  movementId: string
  brewId: string
}

export interface Sample {
  path: string
  body?: unknown
  headers?: Record<string, string>
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
  readVessel: ({ vesselId }) => ({ path: `/api/vessels/${vesselId}?layers=true` }),
  readStack: ({ vesselId }) => ({ path: `/api/vessels/${vesselId}/stack?on=2026-09-01` }),
  readVesselLedger: ({ vesselId }) => ({ path: `/api/vessels/${vesselId}/ledger` }),
  listVesselEvents: ({ vesselId }) => ({ path: `/api/vessels/${vesselId}/events` }),
  recordVesselEvent: ({ vesselId }) => ({ path: `/api/vessels/${vesselId}/events`, body: { id: newId(), kind: 'setApart', occurredOn: '2026-09-14', reason: 'smells of vinegar' } }),
  recordAct: ({ vesselId }) => ({ path: '/api/acts', body: { id: newId(), movements: [{ id: newId(), kind: 'sample', vesselId, litres: 0.2, occurredOn: '2026-09-14' }] } }),
  readAct: ({ actId }) => ({ path: `/api/acts/${actId}` }),
  reverseMovement: ({ movementId }) => ({ path: `/api/movements/${movementId}/reverse`, body: { id: newId(), reason: 'typed wrong' } }),
  reverseAct: ({ actId }) => ({ path: `/api/acts/${actId}/reverse`, body: { id: newId(), reason: 'typed wrong' } }),
  importLedger: () => ({ path: '/api/ledger/import', body: 'date;act;vessel;litres\n2026-09-01;sample;Heron;0.2\n', headers: { 'content-type': 'text/csv' } }),
  exportLedger: () => ({ path: '/api/ledger.csv' }),
  listBrews: () => ({ path: '/api/brews' }),
  changeBrew: ({ brewId }) => ({ path: `/api/brews/${brewId}`, body: { version: 1 } }),
  listBeers: () => ({ path: '/api/beers' }),
  removeVessel: ({ vesselId }) => ({ path: `/api/vessels/${vesselId}?version=1` }),
}
