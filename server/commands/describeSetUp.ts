import { and, desc, eq, gt, isNull } from 'drizzle-orm'
import type { SetUpState } from '#shared/schemas/setUp'
import type { Database } from '#server/database/client'
import { withoutBrewery } from '#server/database/door'
import { anyBrewery } from '#server/database/queries/people'
import { tokens } from '#server/database/schema/index'

/** Whether the installation waits for its set-up, and until when the printed code is good. */
export function describeSetUp(database: Database, now: Date): Promise<SetUpState> {
  return withoutBrewery(database, async (tx) => {
    if (await anyBrewery(tx)) return { open: false, codeGoodUntil: null }
    const [code] = await tx.select({ expiresAt: tokens.expiresAt }).from(tokens)
      .where(and(eq(tokens.kind, 'setUp'), isNull(tokens.usedAt), gt(tokens.expiresAt, now)))
      .orderBy(desc(tokens.expiresAt)).limit(1)
    return { open: true, codeGoodUntil: code?.expiresAt.toISOString() ?? null }
  })
}
