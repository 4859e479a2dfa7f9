import { ROUTES } from '#shared/schemas/routes'
import { listVessels } from '#server/commands/listVessels'

export default defineBreweryHandler(ROUTES.listVessels, ({ work, query }) =>
  listVessels(work, { on: query.on, layers: query.layers === 'true' }))
