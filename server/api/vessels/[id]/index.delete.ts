import { ROUTES } from '#shared/schemas/routes'
import { removeVessel } from '#server/commands/removeVessel'

export default defineBreweryHandler(ROUTES.removeVessel, async ({ work, params, query }) => {
  await removeVessel(work, params.id, query.version)
  return answer(204, null)
})
