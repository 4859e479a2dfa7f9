import { v7 as newId } from 'uuid'
import type { Tx } from '#server/database/client'
import { auditEvents } from '#server/database/schema/index'

export interface AuditEntry {
  /** What was done, a noun and a verb: `vessel.created`. */
  action: string
  subject?: { kind: string, id: string }
  detail?: Record<string, unknown>
}

/** The part of a `Work` that the trail needs. */
interface Author {
  tx: Tx
  brewery: { id: string }
  person: { id: string } | null
  now: Date
}

/** Add to the trail of who did what, in the transaction of the deed itself. */
export async function audit({ tx, brewery, person, now }: Author, { action, subject, detail }: AuditEntry): Promise<void> {
  await tx.insert(auditEvents).values({
    breweryId: brewery.id,
    id: newId(),
    at: now,
    personId: person?.id ?? null,
    action,
    subjectKind: subject?.kind ?? null,
    subjectId: subject?.id ?? null,
    detail: detail ?? null,
  })
}
