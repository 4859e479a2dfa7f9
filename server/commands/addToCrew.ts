import { v7 as newId } from 'uuid'
import type { Role } from '#shared/abilities'
import { memberships, users } from '#server/database/schema/index'
import { audit } from './audit'
import type { Work } from './work'

export interface NewMember {
  name: string
  email: string
  passwordHash: string
  role: Role
  accessUntil: string | null
}

/** Take a new person into the crew. */
export async function addToCrew(work: Work, { role, accessUntil, ...person }: NewMember): Promise<{ id: string }> {
  const { tx, brewery, now } = work
  const id = newId()
  await tx.insert(users).values({ id, ...person, createdAt: now })
  await tx.insert(memberships).values({ breweryId: brewery.id, userId: id, role, accessUntil })
  await audit(work, { action: 'member.added', subject: { kind: 'person', id }, detail: { role } })
  return { id }
}
