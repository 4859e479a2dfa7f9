import { and, eq, gt, isNull, sql } from 'drizzle-orm'
import type { Me } from '#shared/schemas/auth'
import type { SetUp } from '#shared/schemas/setUp'
import { fieldFault, Fault } from '#shared/types/fault'
import type { Database, Tx } from '#server/database/client'
import { openPerson, withoutBrewery } from '#server/database/door'
import { anyBrewery, breweriesOf } from '#server/database/queries/people'
import { tokens } from '#server/database/schema/index'
import { presentMe } from '#server/presenters/me'
import { hashPassword, inTurn, requireUncommon } from '#server/security/passwords'
import { hashToken, tidyCode } from '#server/security/secrets'
import { recordAttempt, requireFewFailures, type Attempt } from './attempts'
import { foundBrewery } from './foundBrewery'
import { openSession } from './session'
import type { Caller } from './signIn'

/** One number for all that set up the same installation: the second waits for the first, and finds it done. */
const LOCK = 7_306_122

/** Make the first brewery of an empty installation and sign its owner in. Opened by the one-time code that the start printed. */
export async function setUpBrewery(database: Database, input: SetUp, caller: Caller): Promise<{ token: string, me: Me }> {
  const { now } = caller
  const codeHash = hashToken(tidyCode(input.code))
  const attempt: Attempt = { kind: 'setUp', accountHash: caller.accountHash, addressHash: caller.addressHash }

  return inTurn(async () => {
    const good = await withoutBrewery(database, async (tx) => {
      await requireFewFailures(tx, attempt, now)
      await requireEmpty(tx)
      const right = await codeIsGood(tx, codeHash, now)
      if (!right) await recordAttempt(tx, attempt, false, now)
      return right
    })
    if (!good) throw wrongCode()
    requireUncommon(input.password, [input.email, input.email.split('@')[0] ?? '', input.name, input.breweryName])
    const passwordHash = await hashPassword(input.password)

    return withoutBrewery(database, async (tx) => {
      await tx.execute(sql`select pg_advisory_xact_lock(${LOCK})`)
      await requireEmpty(tx)
      await useCode(tx, codeHash, now)
      const { person, brewery } = await foundBrewery(tx, { breweryName: input.breweryName, timeZone: input.timeZone, owner: { name: input.name, email: input.email, passwordHash } }, now)
      await openPerson(tx, person.id)
      const token = await openSession(tx, person.id, brewery.id, caller.oldSessionHash, now)
      return { token, me: presentMe(person, brewery.id, await breweriesOf(tx, person.id, now), now) }
    })
  })
}

async function requireEmpty(tx: Tx): Promise<void> {
  if (await anyBrewery(tx)) throw new Fault('notFound', 'This cellar is set up already.')
}

const goodCode = (codeHash: string, now: Date) => and(eq(tokens.kind, 'setUp'), eq(tokens.hash, codeHash), isNull(tokens.usedAt), gt(tokens.expiresAt, now))

async function codeIsGood(tx: Tx, codeHash: string, now: Date): Promise<boolean> {
  const rows = await tx.select({ id: tokens.id }).from(tokens).where(goodCode(codeHash, now))
  return rows.length > 0
}

async function useCode(tx: Tx, codeHash: string, now: Date): Promise<void> {
  const rows = await tx.update(tokens).set({ usedAt: now }).where(goodCode(codeHash, now)).returning({ id: tokens.id })
  if (rows.length === 0) throw wrongCode()
}

function wrongCode(): Fault {
  return fieldFault('code', 'This code does not open the set-up. It stands where Undercroft was started, and a new start prints a new one.')
}
