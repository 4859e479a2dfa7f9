import type { Cohort, Stack } from './stack'

/** Beer of this age and over is told as over three years old. */
export const THREE_YEARS_DAYS = 1_096

/** How old the beer of a vessel is, by the brew-day clock. */
export interface AgePicture {
  /** Weighted by litres, not rounded. */
  meanDays: number
  /** The smallest ages, in whole days, at which so much of the beer is that old or younger. */
  p10Days: number
  p50Days: number
  p90Days: number
  shareOver3Years: number
  oldest: Cohort
}

/**
 * The age picture of a stack, or null for a vessel that holds no beer. What is no beer (fruit, water) takes room in the
 * vessel but counts neither in the mean nor in the percentiles.
 */
export function agePictureOf({ cohorts }: Stack): AgePicture | null {
  const [oldest] = cohorts
  if (oldest === undefined) return null
  const litres = sum(cohorts, cohort => cohort.litres)
  return {
    meanDays: sum(cohorts, cohort => cohort.litres * cohort.ageDays) / litres,
    p10Days: percentile(cohorts, litres, 0.1),
    p50Days: percentile(cohorts, litres, 0.5),
    p90Days: percentile(cohorts, litres, 0.9),
    shareOver3Years: sum(cohorts.filter(cohort => cohort.ageDays >= THREE_YEARS_DAYS), cohort => cohort.litres) / litres,
    oldest,
  }
}

// A share that reaches a tenth exactly must not miss it by the dust of floating point.
const DUST = 1e-9

/** The smallest age at which the beer of that age or younger is `quantile` of the whole. */
function percentile(oldestFirst: readonly Cohort[], litres: number, quantile: number): number {
  let younger = 0
  for (let i = oldestFirst.length - 1; i > 0; i--) {
    const cohort = oldestFirst[i]
    if (cohort === undefined) continue
    younger += cohort.litres
    if (younger >= (quantile - DUST) * litres) return cohort.ageDays
  }
  return oldestFirst[0]?.ageDays ?? 0
}

function sum(cohorts: readonly Cohort[], of: (cohort: Cohort) => number): number {
  return cohorts.reduce((total, cohort) => total + of(cohort), 0)
}
