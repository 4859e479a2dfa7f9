import type { LedgerLine } from './movement'

/** Beer of one brew, racked on one day, first in wood on one day: what can never be told apart again. */
export interface ParcelKind {
  /** Undefined for what is no beer: fruit, water, sugar. It takes room and has no age. */
  brewId: string | undefined
  firstRackedOn: number
  /** Null while the beer has never been in wood. */
  firstWoodOn: number | null
}

/**
 * What is in one vessel. Litres of a parcel are its `amounts` entry times `scale`: a draw, loss or refill changes the
 * scale or adds an entry and never walks through the parcels.
 */
export interface Contents {
  litres: number
  scale: number
  /** Entries in the order in which they came, each the index of a parcel kind. */
  parcels: number[]
  amounts: number[]
  /** More was taken out than the book held: a line is missing, or one is wrong. */
  volumeDoubt: boolean
  /** The last day on which beer was drawn off, or came to beer that was there already; null if none. */
  lastDrawDay: number | null
  lastRefillDay: number | null
}

export interface Cellar {
  parcelKinds: ParcelKind[]
  vessels: Map<string, Contents>
}

export interface ReplayOptions {
  /** Replay through the end of this day; all lines if not given. */
  throughDay?: number
  /** Vessels of wood, for the clock of first wood. */
  wooden?: ReadonlySet<string>
}

// Two volumes that differ by less than this, relative to the larger, are one: what is left is the dust of floating point.
const SAME = 1e-9
// Long before a double would lose precision at its small end.
const SMALLEST_SCALE = 1e-120

/**
 * Replay the ledger: what is in each vessel after the last line. Vessels are taken as fully mixed, so what leaves takes
 * the same share of every parcel (the cohort ledger of fractional blending: vᵢ ← vᵢ·(1 − D/V)). Nothing is rounded.
 *
 * @param lines in ledger order, see `inLedgerOrder`
 */
export function replay(lines: readonly LedgerLine[], { throughDay = Infinity, wooden = NONE }: ReplayOptions = {}): Cellar {
  const cellar: Cellar = { parcelKinds: [], vessels: new Map() }
  const { parcelKinds, vessels } = cellar
  for (const line of lines) {
    if (line.day > throughDay) break
    let vessel = vessels.get(line.vesselId)
    if (vessel === undefined) vessels.set(line.vesselId, vessel = emptyContents())
    switch (line.kind) {
      case 'in':
        if (vessel.litres > 0) vessel.lastRefillDay = line.day
        parcelKinds.push({ brewId: line.brewId, firstRackedOn: line.day, firstWoodOn: wooden.has(line.vesselId) ? line.day : null })
        add(vessel, parcelKinds.length - 1, line.litres)
        break
      case 'addition':
        parcelKinds.push({ brewId: undefined, firstRackedOn: line.day, firstWoodOn: null })
        add(vessel, parcelKinds.length - 1, line.litres)
        break
      case 'move':
        move(cellar, vessel, line, wooden)
        break
      case 'draw':
        vessel.lastDrawDay = line.day
        takeOut(vessel, line.litres)
        break
      default:
        takeOut(vessel, line.litres)
    }
  }
  return cellar
}

const NONE: ReadonlySet<string> = new Set()

function emptyContents(): Contents {
  return { litres: 0, scale: 1, parcels: [], amounts: [], volumeDoubt: false, lastDrawDay: null, lastRefillDay: null }
}

function add(vessel: Contents, parcel: number, litres: number): void {
  vessel.parcels.push(parcel)
  vessel.amounts.push(litres / vessel.scale)
  vessel.litres += litres
}

/** Take litres out evenly. @returns what really was there to be taken, and the share of the vessel that it was */
function takeOut(vessel: Contents, litres: number): { taken: number, share: number } {
  const had = vessel.litres
  if (litres < had * (1 - SAME)) {
    const share = litres / had
    vessel.litres = had - litres
    vessel.scale *= 1 - share
    if (vessel.scale < SMALLEST_SCALE) renormalise(vessel)
    return { taken: litres, share }
  }
  if (litres > had * (1 + SAME)) vessel.volumeDoubt = true
  vessel.litres = 0
  vessel.scale = 1
  vessel.parcels.length = 0
  vessel.amounts.length = 0
  return { taken: Math.min(litres, had), share: 1 }
}

function renormalise(vessel: Contents): void {
  for (let i = 0; i < vessel.amounts.length; i++) vessel.amounts[i] = (vessel.amounts[i] ?? 0) * vessel.scale
  vessel.scale = 1
}

/** Beer goes over in the proportions it had, less the loss on the way, spread evenly. A move of more than was there brings what was there. */
function move(cellar: Cellar, from: Contents, line: LedgerLine, wooden: ReadonlySet<string>): void {
  const { parcelKinds, vessels } = cellar
  const toId = line.toVesselId ?? ''
  let to = vessels.get(toId)
  if (to === undefined) vessels.set(toId, to = emptyContents())
  const parcels = from.parcels.slice()
  const amounts = from.amounts.slice()
  const { scale } = from
  const { taken, share } = takeOut(from, line.litres)
  const arriving = Math.max(0, taken - (line.lossLitres ?? 0))
  if (arriving === 0) return
  if (to.litres > 0) to.lastRefillDay = line.day
  const factor = scale * share * (arriving / taken) / to.scale
  const intoWood = wooden.has(toId)

  const places = new Map<number, number>()
  to.parcels.forEach((parcel, place) => places.set(parcel, place))
  for (let i = 0; i < parcels.length; i++) {
    const parcel = parcelAfterMove(parcelKinds, parcels[i] ?? 0, intoWood, line.day)
    const amount = (amounts[i] ?? 0) * factor
    const place = places.get(parcel)
    if (place === undefined) {
      places.set(parcel, to.parcels.length)
      to.parcels.push(parcel)
      to.amounts.push(amount)
    }
    else {
      to.amounts[place] = (to.amounts[place] ?? 0) + amount
    }
  }
  to.litres += arriving
}

function parcelAfterMove(parcelKinds: ParcelKind[], parcel: number, intoWood: boolean, day: number): number {
  const kind = parcelKinds[parcel]
  if (!intoWood || kind === undefined || kind.firstWoodOn !== null || kind.brewId === undefined) return parcel
  parcelKinds.push({ ...kind, firstWoodOn: day })
  return parcelKinds.length - 1
}
