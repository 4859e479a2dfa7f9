import { ROUTES } from '#shared/schemas/routes'
import { openApiOf } from '#shared/schemas/openApi'
import { version } from '../../package.json'

export default definePublicHandler(ROUTES.openApi, () =>
  openApiOf(Object.values(ROUTES), { version, origin: settings().origin }))
