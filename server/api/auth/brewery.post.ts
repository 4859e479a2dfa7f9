import { ROUTES } from '#shared/schemas/routes'
import { chooseBrewery } from '#server/commands/chooseBrewery'

export default definePersonHandler(ROUTES.chooseBrewery, ({ tx, entered, sessionHash, body, now }) =>
  chooseBrewery(tx, entered.user, sessionHash, body.breweryId, now))
