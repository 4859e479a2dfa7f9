import { eq } from 'drizzle-orm'
import type { Me, SignIn } from '#shared/schemas/auth'
import { Fault } from '#shared/types/fault'
import type { Database } from '#server/database/client'
import { openPerson, withoutBrewery } from '#server/database/door'
import { breweriesOf, userByEmail } from '#server/database/queries/people'
import { users } from '#server/database/schema/index'
import { presentMe } from '#server/presenters/me'
import { decoyHash, hashPassword, inTurn, needsNewHash, verifyPassword } from '#server/security/passwords'
import { recordAttempt, requireFewFailures, type Attempt } from './attempts'
import { openSession } from './session'

// Nobody has an address with other signs than these, and some of them no database takes.
const ADDRESS_SIGNS = /^[\x21-\x7E]+$/

/** Where a sign-in comes from. */
export interface Caller {
  /** A keyed hash of the network address. */
  addressHash: string
  /** A keyed hash of the account's address, as typed. */
  accountHash: string
  /** The session that the browser came with: it ends here. */
  oldSessionHash: string | null
  now: Date
}

/**
 * Check a password and open a session. A wrong password, an unknown address and one that cannot be an address are
 * answered alike, in the same time. A person in one brewery is in it at once.
 */
export async function signIn(database: Database, input: SignIn, caller: Caller): Promise<{ token: string, me: Me }> {
  const { now } = caller
  const attempt: Attempt = { kind: 'signIn', accountHash: caller.accountHash, addressHash: caller.addressHash }
  await withoutBrewery(database, tx => requireFewFailures(tx, attempt, now))

  return inTurn(async () => {
    // Asked again when it is this one's turn: a burst that passed the first look together is stopped here.
    const user = await withoutBrewery(database, async (tx) => {
      await requireFewFailures(tx, attempt, now)
      return ADDRESS_SIGNS.test(input.email) ? userByEmail(tx, input.email.toLowerCase()) : undefined
    })
    const right = await verifyPassword(user?.passwordHash ?? await decoyHash(), input.password)
    if (!user || !right) {
      await withoutBrewery(database, tx => recordAttempt(tx, attempt, false, now))
      throw new Fault('wrongSignIn', 'The address or the password is not right.')
    }
    const newHash = needsNewHash(user.passwordHash) ? await hashPassword(input.password) : null
    return withoutBrewery(database, async (tx) => {
      await recordAttempt(tx, attempt, true, now)
      if (newHash !== null) await tx.update(users).set({ passwordHash: newHash }).where(eq(users.id, user.id))
      await openPerson(tx, user.id)
      const breweries = await breweriesOf(tx, user.id, now)
      const only = breweries.length === 1 ? breweries[0] : undefined
      const token = await openSession(tx, user.id, only?.id ?? null, caller.oldSessionHash, now)
      return { token, me: presentMe(user, only?.id ?? null, breweries, now) }
    })
  })
}
