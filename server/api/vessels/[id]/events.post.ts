import { ROUTES } from '#shared/schemas/routes'
import { recordVesselEvent } from '#server/commands/recordVesselEvent'

export default defineBreweryHandler(ROUTES.recordVesselEvent, async ({ work, params, body }) => {
  const { event, made } = await recordVesselEvent(work, params.id, body)
  return answer(made ? 201 : 200, event)
})
