import type { VesselView } from '#shared/schemas/vessel'

/** Nothing is in it, and nothing is known of it. */
const EMPTY = {
  litres: 0, cohortCount: 0, meanAgeDays: null, p10AgeDays: null, p50AgeDays: null, p90AgeDays: null, shareOver3Years: null, oldestCohort: null, nextDraw: null,
  standingReason: null, standingSince: null, fruiting: false, gravityWatch: false, volumeDoubt: false, overBrim: false, beer: null,
}

/** An empty vat, with what a test says of it. */
export function aVessel(given: Partial<VesselView> = {}): VesselView {
  return { ...EMPTY, id: '0190a000-0000-7000-8000-000000000010', name: 'Heron', kind: 'vat', workingLitres: 4000, wood: true, walkingOrder: 1, version: 1, standing: 'dry', ...given }
}
