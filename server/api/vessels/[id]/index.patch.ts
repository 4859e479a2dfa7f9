import { ROUTES } from '#shared/schemas/routes'
import { changeVessel } from '#server/commands/changeVessel'

export default defineBreweryHandler(ROUTES.changeVessel, ({ work, params, body }) => changeVessel(work, params.id, body))
