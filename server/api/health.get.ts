import { ROUTES } from '#shared/schemas/routes'
import { checkHealth } from '#server/commands/checkHealth'

export default definePublicHandler(ROUTES.health, async ({ database }) => {
  const health = await checkHealth(database, settings().demo === 'load')
  return answer(health.status === 'ok' ? 200 : 503, health)
})
