import { and, eq } from 'drizzle-orm'
import { Fault } from '#shared/types/fault'
import { databaseCode } from '#server/database/door'
import { lockedVesselById } from '#server/database/queries/vessels'
import { vessels } from '#server/database/schema/index'
import { audit } from './audit'
import { noSuchVessel, readVessel } from './readVessel'
import type { Work } from './work'

const FOREIGN_KEY_VIOLATION = '23503'

/** Take away a vessel that was set up by mistake. One that has held beer stays for ever: its lines stand in the ledger. */
export async function removeVessel(work: Work, id: string, version: number): Promise<void> {
  const { tx, brewery } = work
  const before = await lockedVesselById(tx, brewery.id, id)
  if (!before) throw noSuchVessel()
  if (before.version !== version) throw new Fault('stale', 'Somebody changed this vessel first.', { current: await readVessel(work, id) })
  try {
    await tx.delete(vessels).where(and(eq(vessels.breweryId, brewery.id), eq(vessels.id, id)))
  }
  catch (error) {
    if (databaseCode(error) === FOREIGN_KEY_VIOLATION) throw new Fault('inUse', 'This vessel has something on record: beer that it held, or what befell it. It can be retired, not taken away.')
    throw error
  }
  await audit(work, { action: 'vessel.removed', subject: { kind: 'vessel', id }, detail: { name: before.name } })
}
