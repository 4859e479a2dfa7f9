import { ROUTES } from '#shared/schemas/routes'
import { listVessels } from '#server/commands/listVessels'

export default defineBreweryHandler(ROUTES.listVessels, ({ work }) => listVessels(work))
