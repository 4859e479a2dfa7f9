import { agePictureOf } from '#shared/cellar/agePicture'
import { civilDateOf } from '#shared/cellar/civilDate'
import type { Stack } from '#shared/cellar/stack'
import type { StandingPicture } from '#shared/cellar/standing'
import type { VesselView } from '#shared/schemas/vessel'
import type { BrewRow } from '#server/database/queries/ledger'
import type { VesselWithBeer } from '#server/database/queries/vessels'

export interface VesselPicture {
  vessel: VesselWithBeer
  stack: Stack
  standing: StandingPicture
  overBrim: boolean
}

/** A vessel as it goes over the wire: what it is, what is in it, how it stands. */
export function presentVessel({ vessel, stack, standing, overBrim }: VesselPicture): VesselView {
  const { id, name, kind, workingLitres, wood, walkingOrder, beerCode, beerName, version } = vessel
  const ages = agePictureOf(stack)
  return {
    id,
    name,
    kind,
    workingLitres,
    wood,
    walkingOrder,
    litres: stack.litres,
    cohortCount: stack.cohorts.length,
    meanAgeDays: ages?.meanDays ?? null,
    p10AgeDays: ages?.p10Days ?? null,
    p50AgeDays: ages?.p50Days ?? null,
    p90AgeDays: ages?.p90Days ?? null,
    shareOver3Years: ages?.shareOver3Years ?? null,
    oldestCohort: ages && { brewId: ages.oldest.brew.id, brewCode: ages.oldest.brew.code, brewedOn: civilDateOf(ages.oldest.brew.brewedDay), share: ages.oldest.share },
    nextDraw: null,
    standing: standing.standing,
    standingReason: standing.reason,
    standingSince: standing.sinceDay === null ? null : civilDateOf(standing.sinceDay),
    fruiting: standing.fruiting,
    gravityWatch: standing.gravityWatch,
    volumeDoubt: stack.volumeDoubt,
    overBrim,
    beer: beerCode !== null && beerName !== null ? { code: beerCode, name: beerName } : null,
    version,
  }
}

/** The layers of a stack for a drawing of it, oldest first. To a millionth: no drawing shows less, and a cellar has a thousand of them. */
export function presentLayers(stack: Stack, brews: ReadonlyMap<string, BrewRow>): NonNullable<VesselView['layers']> {
  return stack.cohorts.map(({ brew, share }) => ({ brewCode: brew.code, brewedOn: civilDateOf(brew.brewedDay), beerCode: brews.get(brew.id)?.beerCode ?? null, share: Math.round(share * 1e6) / 1e6 }))
}
