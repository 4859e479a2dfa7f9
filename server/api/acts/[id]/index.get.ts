import { ROUTES } from '#shared/schemas/routes'
import { readAct } from '#server/commands/readAct'

export default defineBreweryHandler(ROUTES.readAct, ({ work, params }) => readAct(work, params.id))
