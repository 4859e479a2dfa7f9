import { ROUTES } from '#shared/schemas/routes'
import { reverseMovement } from '#server/commands/reverse'

export default defineBreweryHandler(ROUTES.reverseMovement, async ({ work, params, body }) => {
  const { reversal, made } = await reverseMovement(work, params.id, body)
  return answer(made ? 201 : 200, reversal)
})
