import { ROUTES } from '#shared/schemas/routes'
import { listBrews } from '#server/commands/listBrews'

export default defineBreweryHandler(ROUTES.listBrews, ({ work }) => listBrews(work))
