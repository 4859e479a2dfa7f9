import { ROUTES } from '#shared/schemas/routes'
import { listVesselEvents } from '#server/commands/listVesselEvents'

export default defineBreweryHandler(ROUTES.listVesselEvents, ({ work, params }) => listVesselEvents(work, params.id))
