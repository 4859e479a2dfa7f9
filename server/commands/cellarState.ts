import { epochDay } from '#shared/cellar/civilDate'
import { replay, type Cellar } from '#shared/cellar/replay'
import { stackOf, type Stack } from '#shared/cellar/stack'
import { standingOf, type StandingPicture } from '#shared/cellar/standing'
import { workingLitresOn } from '#shared/cellar/vesselEvent'
import { inLedgerOrder, type LedgerLine } from '#shared/cellar/movement'
import type { Tx } from '#server/database/client'
import { brewsOldestFirst, linesInLedgerOrder, type BrewRow, type MovementRow } from '#server/database/queries/ledger'
import { vesselEventsInOrder, type VesselEventRow } from '#server/database/queries/vesselEvents'
import { vesselsInWalkingOrder, type VesselRow, type VesselWithBeer } from '#server/database/queries/vessels'

/** A brewery's vessels, ledger and events, as they are read once for a request. Everything else is worked out from them. */
export interface CellarState {
  vessels: VesselWithBeer[]
  lines: LedgerLine[]
  brews: Map<string, BrewRow>
  events: Map<string, VesselEventRow[]>
}

/** Read what the engine needs, in one round trip. */
export async function readCellarState(tx: Tx, breweryId: string): Promise<CellarState> {
  const [vessels, lines, brews, events] = await Promise.all([
    vesselsInWalkingOrder(tx, breweryId),
    linesInLedgerOrder(tx, breweryId),
    brewsOldestFirst(tx, breweryId),
    vesselEventsInOrder(tx, breweryId),
  ])
  return { vessels, lines, brews: new Map(brews.map(brew => [brew.id, brew])), events: groupedBy(events, event => event.vesselId) }
}

/** The state as it is once some movements, and brews that they named, have been added to it. */
export function withLines(state: CellarState, rows: readonly MovementRow[], brews: readonly { id: string, code: string, brewedOn: string }[]): CellarState {
  const added = rows.map(({ occurredOn, brewId, toVesselId, lossLitres, ...row }): LedgerLine => ({
    ...row,
    day: epochDay(occurredOn),
    ...(brewId !== null && { brewId }),
    ...(toVesselId !== null && { toVesselId, lossLitres: lossLitres ?? 0 }),
  }))
  const named = brews.filter(brew => !state.brews.has(brew.id))
    .map(brew => [brew.id, { ...brew, brewedDay: epochDay(brew.brewedOn), ageBandDays: null, beerId: null, beerCode: null, beerName: null, version: 1 }] as const)
  return { ...state, lines: [...state.lines, ...added].sort(inLedgerOrder), brews: new Map([...state.brews, ...named]) }
}

/** The cellar at the end of a day, and what to ask of it. */
export interface CellarOnDay {
  cellar: Cellar
  stack(vesselId: string): Stack
}

/** Replay the ledger through the end of a civil date. */
export function cellarOn(state: CellarState, on: string): CellarOnDay {
  const day = epochDay(on)
  const wooden = new Set(state.vessels.filter(vessel => vessel.wood).map(vessel => vessel.id))
  const cellar = replay(state.lines, { throughDay: day, wooden })
  return { cellar, stack: vesselId => stackOf(cellar, vesselId, day, id => brewOf(state, id)) }
}

/** Whether a vessel held more than its working litres on a day. */
export function overBrim(state: CellarState, vessel: VesselRow, litres: number, on: string): boolean {
  const resizes = (state.events.get(vessel.id) ?? []).flatMap(({ kind, occurredOn, fromLitres, toLitres }) =>
    kind === 'resized' && fromLitres !== null && toLitres !== null ? [{ day: epochDay(occurredOn), fromLitres, toLitres }] : [])
  return litres > workingLitresOn(epochDay(on), vessel.workingLitres, resizes) * (1 + 1e-9)
}

/** The standing of a vessel on a day, by its events and the ledger replayed to that day. */
export function standingOn(state: CellarState, vessel: VesselRow, { cellar }: CellarOnDay, on: string): StandingPicture {
  const contents = cellar.vessels.get(vessel.id)
  const events = (state.events.get(vessel.id) ?? []).map(({ kind, occurredOn, reason }) => ({ kind, day: epochDay(occurredOn), reason }))
  return standingOf(events, {
    litres: contents?.litres ?? 0,
    workingLitres: vessel.workingLitres,
    lastDrawDay: contents?.lastDrawDay ?? null,
    lastRefillDay: contents?.lastRefillDay ?? null,
  }, epochDay(on))
}

function groupedBy<Item>(items: readonly Item[], keyOf: (item: Item) => string): Map<string, Item[]> {
  const groups = new Map<string, Item[]>()
  for (const item of items) {
    const group = groups.get(keyOf(item))
    if (group) group.push(item)
    else groups.set(keyOf(item), [item])
  }
  return groups
}

function brewOf({ brews }: CellarState, id: string): BrewRow {
  const brew = brews.get(id)
  // A foreign key sees to it that there is one.
  if (brew === undefined) throw new Error('a line of the ledger names a brew that is not there')
  return brew
}
