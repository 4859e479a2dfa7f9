import { ROUTES } from '#shared/schemas/routes'
import { readStack } from '#server/commands/readStack'

export default defineBreweryHandler(ROUTES.readStack, ({ work, params, query }) => readStack(work, params.id, query.on))
