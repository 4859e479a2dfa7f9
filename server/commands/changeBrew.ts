import { and, eq } from 'drizzle-orm'
import type { BrewChange, BrewView } from '#shared/schemas/brew'
import { fieldFault, Fault } from '#shared/types/fault'
import { beersByCode } from '#server/database/queries/ledger'
import { brews } from '#server/database/schema/index'
import { audit } from './audit'
import { readCellarState } from './cellarState'
import { brewsOf } from './listBrews'
import type { Work } from './work'

/** Say which beer a brew is of, or how well its day is known. Its code and day are what lines of the ledger stand on, and stay. */
export async function changeBrew(work: Work, id: string, { version, beerCode, ageBandDays }: BrewChange): Promise<BrewView> {
  const { tx, brewery } = work
  const [before] = await tx.select().from(brews).where(and(eq(brews.breweryId, brewery.id), eq(brews.id, id))).for('no key update')
  if (!before) throw new Fault('notFound', 'There is no such brew.')
  if (before.version !== version) throw new Fault('stale', 'Somebody changed this brew first.', { current: await describe(work, id) })
  const beer = beerCode === undefined || beerCode === null ? undefined : (await beersByCode(tx, brewery.id)).find(one => one.code === beerCode)
  if (typeof beerCode === 'string' && !beer) throw fieldFault('beerCode', 'There is no beer with this code.')
  await tx.update(brews).set({
    ...(beerCode !== undefined && { beerId: beer?.id ?? null }),
    ...(ageBandDays !== undefined && { ageBandDays }),
    version: version + 1,
  }).where(and(eq(brews.breweryId, brewery.id), eq(brews.id, id)))
  await audit(work, { action: 'brew.changed', subject: { kind: 'brew', id }, detail: { beerCode, ageBandDays } })
  return describe(work, id)
}

async function describe({ tx, brewery, today }: Work, id: string): Promise<BrewView> {
  const brew = brewsOf(await readCellarState(tx, brewery.id), today).find(one => one.id === id)
  if (!brew) throw new Fault('notFound', 'There is no such brew.')
  return brew
}
