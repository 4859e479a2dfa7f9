import { ROUTES } from '#shared/schemas/routes'
import { recordAct } from '#server/commands/recordAct'

export default defineBreweryHandler(ROUTES.recordAct, async ({ work, body }) => {
  const { act, made } = await recordAct(work, body)
  return answer(made ? 201 : 200, act)
})
