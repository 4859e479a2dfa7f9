import { ROUTES } from '#shared/schemas/routes'
import { readVesselLedger } from '#server/commands/readVesselLedger'

export default defineBreweryHandler(ROUTES.readVesselLedger, ({ work, params }) => readVesselLedger(work, params.id))
