import { and, count, desc, eq, gt, lt, min } from 'drizzle-orm'
import { Fault } from '#shared/types/fault'
import type { Tx } from '#server/database/client'
import { signInAttempts } from '#server/database/schema/index'

const MINUTE = 60_000
const DAY = 24 * 60 * MINUTE

/** Failures that are let through in a span, before the next try has to wait. */
const LIMITS = {
  /** One account from one address: somebody guesses, or has forgotten. */
  pair: { failures: 10, span: 15 * MINUTE },
  /** One address on any accounts: one password tried on many. */
  address: { failures: 50, span: 15 * MINUTE },
  /** One account from anywhere. Addresses from which its owner came in before are let through, so that nobody can shut them out. */
  account: { failures: 100, span: 60 * MINUTE },
} as const

/** Whose try it is. Both are keyed hashes. */
export interface Attempt {
  kind: 'signIn' | 'setUp'
  accountHash: string
  addressHash: string
}

/** Refuse a try that comes after too many failed ones. Only failures count, and time heals them. */
export async function requireFewFailures(tx: Tx, attempt: Attempt, now: Date): Promise<void> {
  const { kind, accountHash, addressHash } = attempt
  const ofKind = eq(signInAttempts.kind, kind)
  const fromHere = and(ofKind, eq(signInAttempts.addressHash, addressHash))
  const onAccount = and(ofKind, eq(signInAttempts.accountHash, accountHash))

  await requireUnder(tx, LIMITS.pair, and(fromHere, onAccount), now)
  await requireUnder(tx, LIMITS.address, fromHere, now)
  const [knownHere] = await tx.select({ at: signInAttempts.at }).from(signInAttempts)
    .where(and(fromHere, onAccount, eq(signInAttempts.succeeded, true))).orderBy(desc(signInAttempts.at)).limit(1)
  if (!knownHere) await requireUnder(tx, LIMITS.account, onAccount, now)
}

/** Keep how a try ended, and forget the ones that no limit looks at any more. */
export async function recordAttempt(tx: Tx, attempt: Attempt, succeeded: boolean, now: Date): Promise<void> {
  await tx.insert(signInAttempts).values({ ...attempt, succeeded, at: now })
  await tx.delete(signInAttempts).where(lt(signInAttempts.at, new Date(now.getTime() - 30 * DAY)))
}

async function requireUnder(tx: Tx, { failures, span }: { failures: number, span: number }, which: ReturnType<typeof and>, now: Date): Promise<void> {
  const [found] = await tx.select({ failed: count(), oldest: min(signInAttempts.at) }).from(signInAttempts)
    .where(and(which, eq(signInAttempts.succeeded, false), gt(signInAttempts.at, new Date(now.getTime() - span))))
  if (!found || found.failed < failures) return
  const waitMillis = (found.oldest ?? now).getTime() + span - now.getTime()
  const minutes = Math.max(1, Math.ceil(waitMillis / MINUTE))
  throw new Fault('tooMany', `Too many tries that failed. Try again in ${minutes} ${minutes === 1 ? 'minute' : 'minutes'}.`, { retryAfterSeconds: Math.max(1, Math.ceil(waitMillis / 1000)) })
}
