import { ROUTES } from '#shared/schemas/routes'
import { importLedger } from '#server/commands/importLedger'

export default defineBreweryHandler(ROUTES.importLedger, ({ event, work, query, text }) =>
  importLedger(work, text, { dryRun: query.dryRun === 'true' || query.dryRun === '1', progress: progressTo(event) }))
