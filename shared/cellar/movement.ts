/** What a line of the ledger does. */
export const MOVEMENT_KINDS = ['in', 'draw', 'move', 'loss', 'sample', 'addition'] as const
export type MovementKind = (typeof MOVEMENT_KINDS)[number]

const KINDS: ReadonlySet<string> = new Set(MOVEMENT_KINDS)

/** Whether a word is one of the kinds. */
export function isMovementKind(word: string): word is MovementKind {
  return KINDS.has(word)
}

/** Why beer was lost. */
export const LOSS_REASONS = ['evaporation', 'leak', 'lees', 'transfer', 'dumped'] as const
export type LossReason = (typeof LOSS_REASONS)[number]

/** How litres were measured, with the share by which each is off. Common practice, no source. */
export const METHODS = { weighed: 0.002, flowMeter: 0.005, dip: 0.015, sight: 0.03, guess: 0.1 } as const
export type Method = keyof typeof METHODS
export const METHOD_NAMES = ['weighed', 'flowMeter', 'dip', 'sight', 'guess'] as const satisfies readonly Method[]

/** Where a kind stands within its day, if the sender does not say: a measured loss first, an addition last. Common practice, no source. */
export const PLACE_IN_DAY: Record<MovementKind, number> = { loss: 1, sample: 2, draw: 3, move: 4, in: 5, addition: 6 }

/** One line of the ledger as the engine reads it. Reversed lines are left out by whoever hands the lines over. */
export interface LedgerLine {
  kind: MovementKind
  /** The day it happened, in days since 1970-01-01. */
  day: number
  placeInDay: number
  actId: string
  /** Where the line stands in its act. */
  position: number
  vesselId: string
  /** What leaves the vessel, or, for `in` and `addition`, what arrives in it. */
  litres: number
  /** Of an `in`: the brew. */
  brewId?: string
  /** Of a move: where the beer goes, and what of it is lost on the way. */
  toVesselId?: string
  lossLitres?: number
}

/**
 * The order in which lines are replayed: by day, then place in the day, then the act's id as text, then position in the
 * act. Order of arrival plays no part.
 *
 * @returns below nought if `a` goes first
 */
export function inLedgerOrder(a: LedgerLine, b: LedgerLine): number {
  return a.day - b.day || a.placeInDay - b.placeInDay || compareText(a.actId, b.actId) || a.position - b.position
}

function compareText(a: string, b: string): number {
  return a < b ? -1 : a > b ? 1 : 0
}
