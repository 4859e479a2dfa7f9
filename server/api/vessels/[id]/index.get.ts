import { ROUTES } from '#shared/schemas/routes'
import { readVessel } from '#server/commands/readVessel'

export default defineBreweryHandler(ROUTES.readVessel, ({ work, params, query }) =>
  readVessel(work, params.id, { on: query.on, layers: query.layers === 'true' }))
