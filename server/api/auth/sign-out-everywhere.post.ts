import { ROUTES } from '#shared/schemas/routes'
import { endSessionsOf } from '#server/commands/session'

export default definePersonHandler(ROUTES.signOutEverywhere, async ({ event, tx, entered }) => {
  await endSessionsOf(tx, entered.user.id)
  await dropSessionCookie(event)
  return answer(204, null)
})
