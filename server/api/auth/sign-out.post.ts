import { ROUTES } from '#shared/schemas/routes'
import { signOut } from '#server/commands/signOut'

export default definePublicHandler(ROUTES.signOut, async ({ event, database }) => {
  await signOut(database, await sessionHashOf(event))
  await dropSessionCookie(event)
  return answer(204, null)
})
