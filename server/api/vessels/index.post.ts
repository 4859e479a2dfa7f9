import { ROUTES } from '#shared/schemas/routes'
import { createVessel } from '#server/commands/createVessel'

export default defineBreweryHandler(ROUTES.createVessel, async ({ work, body }) => {
  const { vessel, made } = await createVessel(work, body)
  return answer(made ? 201 : 200, vessel)
})
