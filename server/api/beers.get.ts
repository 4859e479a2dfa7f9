import { ROUTES } from '#shared/schemas/routes'
import { listBeers } from '#server/commands/listBrews'

export default defineBreweryHandler(ROUTES.listBeers, ({ work }) => listBeers(work))
