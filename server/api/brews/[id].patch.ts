import { ROUTES } from '#shared/schemas/routes'
import { changeBrew } from '#server/commands/changeBrew'

export default defineBreweryHandler(ROUTES.changeBrew, ({ work, params, body }) => changeBrew(work, params.id, body))
