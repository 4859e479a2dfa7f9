import { and, eq, isNull } from 'drizzle-orm'
import { v7 as newId } from 'uuid'
import type { Tx } from '#server/database/client'
import { anyBrewery } from '#server/database/queries/people'
import { tokens } from '#server/database/schema/index'
import { hashToken, newCode, tidyCode } from '#server/security/secrets'

const GOOD_FOR_MILLIS = 60 * 60_000

/** A new one-time code for the set-up of an empty installation, in place of any earlier one; null where a brewery is. */
export async function issueSetUpCode(tx: Tx, now: Date): Promise<{ code: string, until: Date } | null> {
  if (await anyBrewery(tx)) return null
  await tx.delete(tokens).where(and(eq(tokens.kind, 'setUp'), isNull(tokens.usedAt)))
  const code = newCode()
  const until = new Date(now.getTime() + GOOD_FOR_MILLIS)
  await tx.insert(tokens).values({ id: newId(), kind: 'setUp', hash: hashToken(tidyCode(code)), createdAt: now, expiresAt: until })
  return { code, until }
}
