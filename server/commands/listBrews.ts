import type { BeerView, BrewView } from '#shared/schemas/brew'
import { beersByCode } from '#server/database/queries/ledger'
import { cellarOn, readCellarState, type CellarState } from './cellarState'
import type { Work } from './work'

/** All brews, newest first, with what is left of each and where. */
export async function listBrews({ tx, brewery, today }: Work): Promise<BrewView[]> {
  return brewsOf(await readCellarState(tx, brewery.id), today)
}

/** The same from a state that was read already. */
export function brewsOf(state: CellarState, on: string): BrewView[] {
  const cellar = cellarOn(state, on)
  const places = new Map<string, BrewView['vessels']>()
  for (const vessel of state.vessels) {
    for (const { brew, litres, share } of cellar.stack(vessel.id).cohorts) {
      const known = places.get(brew.id) ?? []
      places.set(brew.id, [...known, { vesselId: vessel.id, vesselName: vessel.name, litres, share }])
    }
  }
  const racked = new Map<string, number>()
  for (const { brewId, litres } of state.lines) {
    if (brewId !== undefined) racked.set(brewId, (racked.get(brewId) ?? 0) + litres)
  }
  return [...state.brews.values()].reverse().map(({ id, code, brewedOn, ageBandDays, beerId, beerCode, beerName, version }) => {
    const vessels = places.get(id) ?? []
    return { id, code, brewedOn, ageBandDays, beerId, beerCode, beerName, rackedLitres: racked.get(id) ?? 0, litresNow: vessels.reduce((sum, place) => sum + place.litres, 0), vessels, version }
  })
}

/** The beers of the brewery, by code. */
export async function listBeers({ tx, brewery }: Work): Promise<BeerView[]> {
  return (await beersByCode(tx, brewery.id)).map(({ id, code, name, family }) => ({ id, code, name, family }))
}
