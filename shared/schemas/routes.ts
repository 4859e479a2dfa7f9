import { z } from 'zod'
import { ChooseBrewery, Me, SignIn } from './auth'
import { Health } from './health'
import { route, type RouteShape } from './route'
import { SetUp, SetUpState } from './setUp'
import { VesselChange, VesselCreate, VesselParams, VesselRemove, VesselView, VesselsQuery } from './vessel'

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
} as const satisfies Record<string, RouteShape>
