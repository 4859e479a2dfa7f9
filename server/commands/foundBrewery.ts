import { v7 as newId } from 'uuid'
import { civilDateIn } from '#shared/cellar/civilDate'
import type { Tx } from '#server/database/client'
import { openBrewery } from '#server/database/door'
import { breweries, memberships, users } from '#server/database/schema/index'
import { audit } from './audit'
import type { Work } from './work'

export interface Founding {
  breweryName: string
  timeZone: string
  /** `06:30`, by the brewery's clock. */
  sendAt?: string
  owner: { name: string, email: string, passwordHash: string }
}

/** Make a brewery and its owner, and go on in it: what follows in the transaction is done by that owner. */
export async function foundBrewery(tx: Tx, { breweryName, timeZone, sendAt, owner }: Founding, now: Date): Promise<Work> {
  const brewery = { id: newId(), name: breweryName, timeZone }
  const person = { id: newId(), name: owner.name, email: owner.email }
  await tx.insert(breweries).values({ ...brewery, ...(sendAt !== undefined && { sendAt }), createdAt: now })
  await tx.insert(users).values({ ...person, passwordHash: owner.passwordHash, createdAt: now })
  await openBrewery(tx, brewery.id)
  await tx.insert(memberships).values({ breweryId: brewery.id, userId: person.id, role: 'owner' })
  const work: Work = { tx, brewery, person, role: 'owner', now, today: civilDateIn(timeZone, now.getTime()) }
  await audit(work, { action: 'brewery.founded', subject: { kind: 'brewery', id: brewery.id } })
  return work
}
