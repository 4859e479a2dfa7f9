import { and, eq, lt } from 'drizzle-orm'
import { hashToken, newToken } from '#server/security/secrets'
import type { Tx } from '#server/database/client'
import { sessions } from '#server/database/schema/index'

/** Signed out after so long, whatever happens; and, in the database's `enter_session`, after 14 days without a request. */
export const SESSION_DAYS = 60
const DAY = 86_400_000

/** Sign a person in: a new row under a new token, in place of the session that the browser came with, if any. */
export async function openSession(tx: Tx, userId: string, breweryId: string | null, oldHash: string | null, now: Date): Promise<string> {
  if (oldHash !== null) await endSession(tx, oldHash)
  await tx.delete(sessions).where(and(eq(sessions.userId, userId), lt(sessions.expiresAt, now)))
  const token = newToken()
  await tx.insert(sessions).values({
    tokenHash: hashToken(token),
    userId,
    breweryId,
    createdAt: now,
    lastSeenAt: now,
    expiresAt: new Date(now.getTime() + SESSION_DAYS * DAY),
  })
  return token
}

/** End one session. Ending one that is over changes nothing. */
export async function endSession(tx: Tx, sessionHash: string): Promise<void> {
  await tx.delete(sessions).where(eq(sessions.tokenHash, sessionHash))
}

/** End every session of a person, on every device. */
export async function endSessionsOf(tx: Tx, userId: string): Promise<void> {
  await tx.delete(sessions).where(eq(sessions.userId, userId))
}
