import { ROUTES } from '#shared/schemas/routes'
import { signIn } from '#server/commands/signIn'

export default definePublicHandler(ROUTES.signIn, async ({ event, database, body, now }) => {
  const { token, me } = await signIn(database, body, await callerOf(event, body.email, now))
  await giveSessionCookie(event, token)
  return me
})
