import { and, eq, inArray } from 'drizzle-orm'
import { v7 as newId } from 'uuid'
import { Fault } from '#shared/types/fault'
import { beersByCode } from '#server/database/queries/ledger'
import { brews } from '#server/database/schema/index'
import { inParts } from './inParts'
import type { Work } from './work'

export interface NamedBrew {
  code: string
  brewedOn: string
  ageBandDays?: number
  beerCode?: string
}

/** A brew as far as a line of the ledger has to know it. */
export interface KnownBrew {
  id: string
  code: string
  brewedOn: string
}

/** Brews by their codes; those that are new are made. A code that names another day is refused. */
export async function brewsByCode(work: Work, named: readonly NamedBrew[]): Promise<Map<string, KnownBrew>> {
  if (named.length === 0) return new Map()
  const { tx, brewery } = work
  const beers = await beersByCode(tx, brewery.id)
  const wanted = new Map(named.map(brew => [brew.code, brew]))
  const known = new Map<string, KnownBrew>()
  for (const some of inParts([...wanted.values()])) {
    await tx.insert(brews).values(some.map(brew => ({
      breweryId: brewery.id,
      id: newId(),
      code: brew.code,
      brewedOn: brew.brewedOn,
      ageBandDays: brew.ageBandDays ?? null,
      beerId: beerIdOf(brew, beers),
      createdAt: work.now,
    }))).onConflictDoNothing({ target: [brews.breweryId, brews.code] })
    const rows = await tx.select({ id: brews.id, code: brews.code, brewedOn: brews.brewedOn }).from(brews)
      .where(and(eq(brews.breweryId, brewery.id), inArray(brews.code, some.map(brew => brew.code))))
    for (const row of rows) {
      requireSameDay(row, wanted.get(row.code))
      known.set(row.code, row)
    }
  }
  return known
}

function requireSameDay(row: { code: string, brewedOn: string }, wanted: NamedBrew | undefined): void {
  if (wanted?.brewedOn === row.brewedOn) return
  throw new Fault('invalid', `Brew ${row.code} was brewed on ${row.brewedOn}. One code has one brew day.`, { errors: [{ field: 'movements', message: `Brew ${row.code} was brewed on ${row.brewedOn}.` }] })
}

/** The beer of a brew: as it is named, else the one whose code begins the brew's, the longest such, else none. */
export function beerIdOf({ code, beerCode }: Pick<NamedBrew, 'code' | 'beerCode'>, beers: readonly { id: string, code: string }[]): string | null {
  if (beerCode !== undefined) return beers.find(beer => beer.code === beerCode)?.id ?? null
  const begins = beers.filter(beer => code.startsWith(beer.code)).sort((a, b) => b.code.length - a.code.length)
  return begins[0]?.id ?? null
}
