import type { StackView } from '#shared/schemas/stack'
import type { Layer } from './layers'
import { SMALLEST_SHARE } from './layers'

export type StackCohort = StackView['cohorts'][number]

/** A line of the table of a stack: a brew, or all that is too little to be told apart. */
export interface CohortRow {
  id: string
  code: string
  brewedOn: string | null
  litres: number
  share: number
  ageDays: number | null
  ageBandDays: number | null
}

/** The stack as its table tells it, youngest first. */
export function cohortRows(cohorts: readonly StackCohort[]): CohortRow[] {
  const rows: CohortRow[] = cohorts.filter(({ share }) => share >= SMALLEST_SHARE)
    .map(({ brewId, brewCode, brewedOn, litres, share, ageDays, ageBandDays }) => ({ id: brewId, code: brewCode, brewedOn, litres, share, ageDays, ageBandDays })).reverse()
  const crumbs = cohorts.filter(({ share }) => share < SMALLEST_SHARE)
  if (crumbs.length === 0) return rows
  return [...rows, { id: 'rest', code: 'older rest', brewedOn: null, litres: sumOf(crumbs, ({ litres }) => litres), share: sumOf(crumbs, ({ share }) => share), ageDays: null, ageBandDays: null }]
}

/** The stack as its drawing needs it, oldest first. */
export function layersOf(cohorts: readonly StackCohort[]): Layer[] {
  return cohorts.map(({ brewCode, brewedOn, beerCode, share }) => ({ brewCode, brewedOn, beerCode, share }))
}

export function sumOf<Item>(items: readonly Item[], of: (item: Item) => number): number {
  return items.reduce((sum, item) => sum + of(item), 0)
}
