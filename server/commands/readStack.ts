import { agePictureOf } from '#shared/cellar/agePicture'
import { civilDateOf } from '#shared/cellar/civilDate'
import type { StackView } from '#shared/schemas/stack'
import { cellarOn, overBrim, readCellarState } from './cellarState'
import { noSuchVessel } from './readVessel'
import type { Work } from './work'

/** What is in a vessel at the end of a day, cohort by cohort, oldest first. */
export async function readStack(work: Work, vesselId: string, on = work.today): Promise<StackView> {
  const state = await readCellarState(work.tx, work.brewery.id)
  const vessel = state.vessels.find(one => one.id === vesselId)
  if (!vessel) throw noSuchVessel()
  const stack = cellarOn(state, on).stack(vesselId)
  const ages = agePictureOf(stack)
  return {
    vesselId,
    on,
    litres: stack.litres,
    meanAgeDays: ages?.meanDays ?? null,
    p10AgeDays: ages?.p10Days ?? null,
    p50AgeDays: ages?.p50Days ?? null,
    p90AgeDays: ages?.p90Days ?? null,
    shareOver3Years: ages?.shareOver3Years ?? null,
    volumeDoubt: stack.volumeDoubt,
    overBrim: overBrim(state, vessel, stack.litres, on),
    cohorts: stack.cohorts.map(({ brew, litres, share, ageDays }) => {
      const row = state.brews.get(brew.id)
      return { brewId: brew.id, brewCode: brew.code, brewedOn: civilDateOf(brew.brewedDay), ageBandDays: row?.ageBandDays ?? null, beerCode: row?.beerCode ?? null, litres, share, ageDays }
    }),
  }
}
