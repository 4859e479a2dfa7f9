import { ROUTES } from '#shared/schemas/routes'
import { importLedger } from '#server/commands/importLedger'

export default defineBreweryHandler(ROUTES.importLedger, ({ event, work, query, text }) =>
  importLedger(work, text, { dryRun: query.dryRun !== undefined && !['false', '0'].includes(query.dryRun), progress: progressTo(event) }))
