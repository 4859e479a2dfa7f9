import type { VesselView } from '#shared/schemas/vessel'
import type { VesselWithBeer } from '#server/database/queries/vessels'
import { presentLayers, presentVessel } from '#server/presenters/vessel'
import { cellarOn, overBrim, readCellarState, standingOn, type CellarOnDay, type CellarState } from './cellarState'
import type { Work } from './work'

export interface OnDay {
  /** The end of this civil date; today if not given. A vessel's standing is always today's. */
  on?: string
  layers?: boolean
}

/** All vessels of the brewery in walking order, with what is in each at the end of a day. */
export async function listVessels(work: Work, options: OnDay = {}): Promise<VesselView[]> {
  const state = await readCellarState(work.tx, work.brewery.id)
  return picturesOf(work, state, options)
}

/** The same from a state that was read already. */
export function picturesOf(work: Work, state: CellarState, options: OnDay = {}): VesselView[] {
  const on = options.on ?? work.today
  const then = cellarOn(state, on)
  const now = on === work.today ? then : cellarOn(state, work.today)
  return state.vessels.map(vessel => pictureOf(vessel, { state, then, now, on, today: work.today, layers: options.layers ?? false }))
}

interface Moment {
  state: CellarState
  then: CellarOnDay
  now: CellarOnDay
  on: string
  today: string
  layers: boolean
}

function pictureOf(vessel: VesselWithBeer, { state, then, now, on, today, layers }: Moment): VesselView {
  const stack = then.stack(vessel.id)
  return {
    ...presentVessel({ vessel, stack, standing: standingOn(state, vessel, now, today), overBrim: overBrim(state, vessel, stack.litres, on) }),
    ...(layers && { layers: presentLayers(stack, state.brews) }),
  }
}
