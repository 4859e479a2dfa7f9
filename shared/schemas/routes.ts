import { z } from 'zod'
import { ChooseBrewery, Me, SignIn } from './auth'
import { BeerView, BrewChange, BrewView } from './brew'
import { Health } from './health'
import { ActInput, ActRecorded, ActReversed, ActView, ImportQuery, ImportReport, MovementReversed, ReverseInput, VesselLedger } from './ledger'
import { route, type RouteShape } from './route'
import { SetUp, SetUpState } from './setUp'
import { OnQuery, StackView } from './stack'
import { VesselChange, VesselCreate, VesselParams, VesselRemove, VesselView, VesselsQuery } from './vessel'
import { VesselEventInput, VesselEventView } from './vesselEvent'

const nothing = z.strictObject({})
const done = { 204: { describes: 'Done. Nothing to say.' } }

/** Every route of the application. A file in `server/api` and a line here belong together; a test holds them to it. */
export const ROUTES = {
  health: route({
    method: 'GET', path: '/api/health', summary: 'Whether the application is up', access: 'public',
    answers: { 200: { describes: 'It serves.', schema: Health }, 503: { describes: 'It does not serve yet, or no more.', schema: Health } },
  }),
  openApi: route({
    method: 'GET', path: '/api/openapi.json', summary: 'This document', access: 'public',
    answers: { 200: { describes: 'The OpenAPI document.' } },
  }),
  setUpState: route({
    method: 'GET', path: '/api/set-up', summary: 'Whether this installation waits for its set-up', access: 'public',
    answers: { 200: { describes: 'Whether it is open.', schema: SetUpState } },
  }),
  setUp: route({
    method: 'POST', path: '/api/set-up', summary: 'Set up an empty installation and sign its owner in', access: 'public', body: SetUp,
    answers: { 201: { describes: 'The brewery is made; a cookie signs its owner in.', schema: Me } },
  }),
  signIn: route({
    method: 'POST', path: '/api/auth/sign-in', summary: 'Sign in', access: 'public', body: SignIn,
    answers: { 200: { describes: 'Signed in; a cookie says so from now on.', schema: Me } },
  }),
  signOut: route({
    method: 'POST', path: '/api/auth/sign-out', summary: 'Sign out on this device', access: 'public', body: nothing.optional(),
    answers: done,
  }),
  signOutEverywhere: route({
    method: 'POST', path: '/api/auth/sign-out-everywhere', summary: 'Sign out on every device', access: 'signedIn', body: nothing.optional(),
    answers: done,
  }),
  chooseBrewery: route({
    method: 'POST', path: '/api/auth/brewery', summary: 'Go on in another brewery of one’s own', access: 'signedIn', body: ChooseBrewery,
    answers: { 200: { describes: 'In that brewery from now on.', schema: Me } },
  }),
  me: route({
    method: 'GET', path: '/api/me', summary: 'Who is signed in, and where', access: 'signedIn',
    answers: { 200: { describes: 'The person, the brewery, the role.', schema: Me } },
  }),
  listVessels: route({
    method: 'GET', path: '/api/vessels', summary: 'All vessels in walking order, with what is in each', access: { ability: 'readCellar' }, query: VesselsQuery,
    answers: { 200: { describes: 'The vessels.', schema: z.array(VesselView) } },
  }),
  createVessel: route({
    method: 'POST', path: '/api/vessels', summary: 'Set up a vessel', access: { ability: 'editVessels' }, body: VesselCreate,
    answers: { 201: { describes: 'Kept.', schema: VesselView }, 200: { describes: 'Was kept already, with the same content.', schema: VesselView } },
  }),
  changeVessel: route({
    method: 'PATCH', path: '/api/vessels/{id}', summary: 'Change a vessel', access: { ability: 'editVessels' }, params: VesselParams, body: VesselChange,
    answers: { 200: { describes: 'Changed.', schema: VesselView } },
  }),
  removeVessel: route({
    method: 'DELETE', path: '/api/vessels/{id}', summary: 'Take away a vessel that never held beer', access: { ability: 'editVessels' }, params: VesselParams, query: z.strictObject({ version: z.coerce.number().pipe(VesselRemove.shape.version) }),
    answers: done,
  }),
  readVessel: route({
    method: 'GET', path: '/api/vessels/{id}', summary: 'One vessel', access: { ability: 'readCellar' }, params: VesselParams, query: VesselsQuery,
    answers: { 200: { describes: 'The vessel.', schema: VesselView } },
  }),
  readStack: route({
    method: 'GET', path: '/api/vessels/{id}/stack', summary: 'What is in a vessel at the end of a day, cohort by cohort', access: { ability: 'readCellar' }, params: VesselParams, query: OnQuery,
    answers: { 200: { describes: 'The stack, oldest first.', schema: StackView } },
  }),
  readVesselLedger: route({
    method: 'GET', path: '/api/vessels/{id}/ledger', summary: 'The lines and notes of a vessel, newest first', access: { ability: 'readCellar' }, params: VesselParams,
    answers: { 200: { describes: 'The ledger of the vessel.', schema: VesselLedger } },
  }),
  listVesselEvents: route({
    method: 'GET', path: '/api/vessels/{id}/events', summary: 'What befell a vessel besides its beer, newest first', access: { ability: 'readCellar' }, params: VesselParams,
    answers: { 200: { describes: 'The events.', schema: z.array(VesselEventView) } },
  }),
  recordVesselEvent: route({
    method: 'POST', path: '/api/vessels/{id}/events', summary: 'Record what befell a vessel', access: { ability: 'record' }, params: VesselParams, body: VesselEventInput,
    answers: { 201: { describes: 'Kept.', schema: VesselEventView }, 200: { describes: 'Was kept already, with the same content.', schema: VesselEventView } },
  }),
  recordAct: route({
    method: 'POST', path: '/api/acts', summary: 'Record movements that belong together, all or none', access: { ability: 'record' }, body: ActInput,
    answers: { 201: { describes: 'Kept, and what it changed.', schema: ActRecorded }, 200: { describes: 'Was kept already, with the same content.', schema: ActRecorded } },
  }),
  readAct: route({
    method: 'GET', path: '/api/acts/{id}', summary: 'One act with its movements', access: { ability: 'readCellar' }, params: VesselParams,
    answers: { 200: { describes: 'The act.', schema: ActView } },
  }),
  reverseMovement: route({
    method: 'POST', path: '/api/movements/{id}/reverse', summary: 'Strike one movement out', access: { ability: 'reverse' }, params: VesselParams, body: ReverseInput,
    answers: { 201: { describes: 'Struck out, and what that changed.', schema: MovementReversed }, 200: { describes: 'Was struck out already, by the same request.', schema: MovementReversed } },
  }),
  reverseAct: route({
    method: 'POST', path: '/api/acts/{id}/reverse', summary: 'Strike out every movement of an act that still stands', access: { ability: 'reverse' }, params: VesselParams, body: ReverseInput,
    answers: { 201: { describes: 'Struck out, and what that changed.', schema: ActReversed }, 200: { describes: 'Was struck out already, by the same request.', schema: ActReversed } },
  }),
  importLedger: route({
    method: 'POST', path: '/api/ledger/import', summary: 'Take in a ledger as CSV, all of it or nothing', access: { ability: 'importLedger' }, query: ImportQuery, text: 'text/csv',
    answers: { 200: { describes: 'What was found and, unless it was a dry run, kept.', schema: ImportReport } },
  }),
  exportLedger: route({
    method: 'GET', path: '/api/ledger.csv', summary: 'The whole ledger as CSV', access: { ability: 'exportLedger' },
    answers: { 200: { describes: 'The ledger, with its notes and reversals.', type: 'text/csv' } },
  }),
  listBrews: route({
    method: 'GET', path: '/api/brews', summary: 'All brews, newest first, and where each still is', access: { ability: 'readCellar' },
    answers: { 200: { describes: 'The brews.', schema: z.array(BrewView) } },
  }),
  changeBrew: route({
    method: 'PATCH', path: '/api/brews/{id}', summary: 'Say which beer a brew is of, or how well its day is known', access: { ability: 'editVessels' }, params: VesselParams, body: BrewChange,
    answers: { 200: { describes: 'Changed.', schema: BrewView } },
  }),
  listBeers: route({
    method: 'GET', path: '/api/beers', summary: 'The beers of the brewery', access: { ability: 'readCellar' },
    answers: { 200: { describes: 'The beers.', schema: z.array(BeerView) } },
  }),
} as const satisfies Record<string, RouteShape>
