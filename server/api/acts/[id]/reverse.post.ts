import { ROUTES } from '#shared/schemas/routes'
import { reverseAct } from '#server/commands/reverse'

export default defineBreweryHandler(ROUTES.reverseAct, async ({ work, params, body }) => {
  const { struck, made } = await reverseAct(work, params.id, body)
  return answer(made ? 201 : 200, struck)
})
