import { and, eq } from 'drizzle-orm'
import type { VesselChange, VesselView } from '#shared/schemas/vessel'
import { Fault } from '#shared/types/fault'
import { breaksUnique } from '#server/database/door'
import { lockedVesselById } from '#server/database/queries/vessels'
import { vessels } from '#server/database/schema/index'
import { audit } from './audit'
import { nameTaken } from './createVessel'
import { hasLines, recordResize } from './recordVesselEvent'
import { noSuchVessel, readVessel } from './readVessel'
import type { Work } from './work'

/** Change what a vessel is called, made as, holds, or where it stands on the walk. A sender who saw an older version is told what is there now. */
export async function changeVessel(work: Work, id: string, { version, ...changes }: VesselChange): Promise<VesselView> {
  const { tx, brewery } = work
  const before = await lockedVesselById(tx, brewery.id, id)
  if (!before) throw noSuchVessel()
  if (before.version !== version) throw new Fault('stale', 'Somebody changed this vessel first.', { current: await readVessel(work, id) })
  if (Object.keys(changes).length === 0) return readVessel(work, id)
  try {
    const [after] = await tx.update(vessels).set({ ...changes, version: version + 1 })
      .where(and(eq(vessels.breweryId, brewery.id), eq(vessels.id, id)))
      .returning()
    if (!after) throw new Error('an update of a locked row found none')
    await audit(work, { action: 'vessel.changed', subject: { kind: 'vessel', id }, detail: changes })
    // What it held before stays known for the days before: its beer may have stood below the brim then.
    if (after.workingLitres !== before.workingLitres && await hasLines(work, id)) await recordResize(work, id, work.today, before.workingLitres, after.workingLitres)
    return await readVessel(work, id)
  }
  catch (error) {
    throw changes.name !== undefined && breaksUnique(error, 'vessels_name_key') ? nameTaken(changes.name) : error
  }
}
