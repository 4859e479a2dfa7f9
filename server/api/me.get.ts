import { ROUTES } from '#shared/schemas/routes'
import { describeMe } from '#server/commands/describeMe'

export default definePersonHandler(ROUTES.me, ({ tx, entered, now }) =>
  describeMe(tx, entered.user, entered.member?.breweryId ?? null, now))
