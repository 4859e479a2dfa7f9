import { setResponseHeader } from 'h3'
import { ROUTES } from '#shared/schemas/routes'
import { exportLedger } from '#server/commands/exportLedger'

export default defineBreweryHandler(ROUTES.exportLedger, ({ event, work }) => {
  setResponseHeader(event, 'content-type', 'text/csv; charset=utf-8')
  setResponseHeader(event, 'content-disposition', `attachment; filename="ledger-${work.today}.csv"`)
  return exportLedger(work)
})
