import { ROUTES } from '#shared/schemas/routes'
import { describeSetUp } from '#server/commands/describeSetUp'

export default definePublicHandler(ROUTES.setUpState, ({ database, now }) => describeSetUp(database, now))
