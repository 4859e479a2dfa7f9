import { v7 as newId } from 'uuid'
import { beers } from '#server/database/schema/index'
import { audit } from './audit'
import type { Work } from './work'

/** Name a beer that the brewery makes. */
export async function createBeer(work: Work, beer: { code: string, name: string, family: string }): Promise<{ id: string }> {
  const id = newId()
  await work.tx.insert(beers).values({ breweryId: work.brewery.id, id, ...beer })
  await audit(work, { action: 'beer.created', subject: { kind: 'beer', id }, detail: beer })
  return { id }
}
