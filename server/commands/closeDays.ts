import { v7 as newId } from 'uuid'
import { closedDays } from '#server/database/schema/index'
import { audit } from './audit'
import type { Work } from './work'

/** Days on which nobody works: by a rule of RFC 5545, or a span that comes every year. */
export type ClosedDays = { rule: string } | { fromMonthDay: string, toMonthDay: string, since: string | null }

/** Mark days as closed. */
export async function closeDays(work: Work, days: ClosedDays): Promise<{ id: string }> {
  const id = newId()
  await work.tx.insert(closedDays).values({ breweryId: work.brewery.id, id, ...days })
  await audit(work, { action: 'days.closed', subject: { kind: 'closedDays', id }, detail: { ...days } })
  return { id }
}
