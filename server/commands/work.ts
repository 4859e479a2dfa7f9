import type { Role } from '#shared/abilities'
import type { Tx } from '#server/database/client'

/** What a command works with: the brewery's open transaction, who asks, and what time it is. Knows nothing of HTTP. */
export interface Work {
  tx: Tx
  brewery: { id: string, name: string, timeZone: string }
  person: { id: string, name: string, email: string }
  role: Role
  /** The application's clock. */
  now: Date
  /** The brewery's civil date at `now`. */
  readonly today: string
}
