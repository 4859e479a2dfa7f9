import type { VesselView } from '#shared/schemas/vessel'
import { daysFrom } from './civilDate'

export interface AgeBand {
  words: string
  litres: number
  /** Of all beer of the cellar, 0 to 1. */
  share: number
  /** The step of the ramp that stands for it. */
  step: number
}

/** Up to and with so many days; the last band has no end. */
const BANDS = [
  { words: 'under 1 year', days: 365, step: 1 },
  { words: '1 to 2 years', days: 730, step: 3 },
  { words: '2 to 3 years', days: 1_095, step: 5 },
  { words: '3 to 5 years', days: 1_826, step: 7 },
  { words: '5 years and over', days: Infinity, step: 10 },
] as const

/** All beer of the cellar by age on a day, youngest first. */
export function ageBands(vessels: readonly VesselView[], day: string): AgeBand[] {
  const litres = BANDS.map(() => 0)
  for (const vessel of vessels) {
    for (const layer of vessel.layers ?? []) {
      const age = daysFrom(layer.brewedOn, day)
      const band = BANDS.findIndex(({ days }) => age <= days)
      litres[band] = (litres[band] ?? 0) + layer.share * vessel.litres
    }
  }
  const all = litres.reduce((sum, part) => sum + part, 0)
  return BANDS.map(({ words, step }, index) => ({ words, step, litres: litres[index] ?? 0, share: all === 0 ? 0 : (litres[index] ?? 0) / all }))
}
