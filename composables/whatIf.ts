import { agePictureOf } from '#shared/cellar/agePicture'
import type { LedgerLine } from '#shared/cellar/movement'
import { replay } from '#shared/cellar/replay'
import { stackOf } from '#shared/cellar/stack'
import type { StackView } from '#shared/schemas/stack'
import type { Layer } from './layers'
import { daysFrom } from './civilDate'

/** How a vessel's beer is: before an act, or as it would be after. */
export interface Picture {
  litres: number
  layers: Layer[]
  ages: { mean: number, p10: number, p50: number, p90: number } | null
}

/** Beer that goes in: of one brew, or out of another vessel in the proportions that it has there. */
export type Incoming
  = | { kind: 'brew', code: string, brewedOn: string, beerCode: string | null, litres: number }
    | { kind: 'stack', stack: StackView, litres: number }

const VESSEL = 'vessel'

/**
 * What a vessel would hold at the end of a day if so much went out and so much came in. The lines go through the same
 * engine as the ledger itself: the stack is set up as it stands, and the act replayed on it.
 */
export function pictureAfter(before: StackView, { out, incoming }: { out: number, incoming: readonly Incoming[] }): Picture {
  const brews = new Map<string, { code: string, brewedOn: string, beerCode: string | null }>()
  const lines: LedgerLine[] = []
  const line = (kind: LedgerLine['kind'], litres: number, brewId?: string) => {
    if (litres > 0) lines.push({ kind, day: 0, placeInDay: 0, actId: '', position: lines.length, vesselId: VESSEL, litres, ...(brewId === undefined ? {} : { brewId }) })
  }
  const fill = (stack: StackView, litres: number) => {
    const share = stack.litres === 0 ? 0 : litres / stack.litres
    for (const { brewCode, brewedOn, beerCode, litres } of stack.cohorts) {
      brews.set(brewCode, { code: brewCode, brewedOn, beerCode })
      line('in', litres * share, brewCode)
    }
    line('addition', (stack.litres - stack.cohorts.reduce((sum, cohort) => sum + cohort.litres, 0)) * share)
  }
  fill(before, before.litres)
  line('draw', out)
  for (const beer of incoming) {
    if (beer.kind === 'stack') {
      fill(beer.stack, Math.min(beer.litres, beer.stack.litres))
      continue
    }
    brews.set(beer.code, { code: beer.code, brewedOn: beer.brewedOn, beerCode: beer.beerCode })
    line('in', beer.litres, beer.code)
  }
  const stack = stackOf(replay(lines), VESSEL, 0, (id) => {
    const brewedOn = brews.get(id)?.brewedOn ?? before.on
    return { id, code: id, brewedDay: daysFrom(before.on, brewedOn) }
  })
  const ages = agePictureOf(stack)
  return {
    litres: stack.litres,
    layers: stack.cohorts.map(({ brew, share }) => ({ brewCode: brew.code, brewedOn: brews.get(brew.id)?.brewedOn ?? before.on, beerCode: brews.get(brew.id)?.beerCode ?? null, share })),
    ages: ages && { mean: ages.meanDays, p10: ages.p10Days, p50: ages.p50Days, p90: ages.p90Days },
  }
}

/** The one sentence on what an act does to the mean age. */
export function meanShiftWords(before: Picture['ages'], after: Picture['ages']): string {
  if (!after) return before ? 'The vessel is empty after it.' : 'The vessel stays empty.'
  const now = `${Math.round(after.mean).toLocaleString('en-GB')}\u00A0d`
  if (!before) return `The mean age is ${now} after it.`
  const shift = Math.round(after.mean) - Math.round(before.mean)
  if (shift === 0) return `The mean stays at ${now}.`
  return `The mean ${shift < 0 ? 'falls' : 'rises'} by ${Math.abs(shift).toLocaleString('en-GB')}\u00A0d to ${now}.`
}

const NEAR = 0.002
const FRACTIONS = [['half', 1 / 2], ['a third', 1 / 3], ['a quarter', 1 / 4], ['a fifth', 1 / 5], ['a tenth', 1 / 10]] as const

/** What part of each layer goes out with so many litres. */
export function partWords(litres: number, of: number): string {
  const share = of === 0 ? 0 : litres / of
  if (share >= 1 - NEAR) return 'all of each layer'
  const near = FRACTIONS.find(([, part]) => Math.abs(share - part) < NEAR)
  return near ? `${near[0]} of each layer` : `${Math.round(share * 1000) / 10}\u00A0% of each layer`
}
