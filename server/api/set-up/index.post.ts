import { ROUTES } from '#shared/schemas/routes'
import { setUpBrewery } from '#server/commands/setUpBrewery'

export default definePublicHandler(ROUTES.setUp, async ({ event, database, body, now }) => {
  const { token, me } = await setUpBrewery(database, body, await callerOf(event, body.email, now))
  await giveSessionCookie(event, token)
  return answer(201, me)
})
