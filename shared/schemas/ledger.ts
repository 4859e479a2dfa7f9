import { z } from 'zod'
import { LOSS_REASONS, METHOD_NAMES, MOVEMENT_KINDS } from '../cellar/movement'
import { WORKING_LITRES_MAX } from '../cellar/vessel'
import { CivilDate, Id, Instant, line, lines, litres, litresOrNone } from './fields'

export const BREW_CODE_MAX = 40
export const LOT_MAX = 60
export const NOTE_MAX = 500
export const REASON_MAX = 300

/** A day of the ledger. It may lie as far back as the calendar of computers; not after today, which the command sees to. */
const LedgerDay = CivilDate.refine(date => date >= '1970-01-01', { error: 'The ledger begins with 1970.' })

const Litres = litres(WORKING_LITRES_MAX)

/** The brew of an `in`: one that is known, or a new one by its code and brew day. */
export const BrewRef = z.union([
  z.strictObject({ id: Id }),
  z.strictObject({
    code: line(BREW_CODE_MAX),
    brewedOn: CivilDate,
    ageBandDays: z.int().min(1).max(3650).optional(),
    beerCode: line(BREW_CODE_MAX).optional(),
  }),
], { error: 'Name the brew: by its id, or by its code and brew day.' })
export type BrewRef = z.output<typeof BrewRef>

const common = {
  id: Id,
  vesselId: Id,
  litres: Litres,
  occurredOn: LedgerDay,
  placeInDay: z.int().min(0).max(1000).optional(),
  method: z.enum(METHOD_NAMES).optional(),
  note: lines(NOTE_MAX).optional(),
}

export const MovementInput = z.discriminatedUnion('kind', [
  z.strictObject({ ...common, kind: z.literal('in'), brew: BrewRef }),
  z.strictObject({ ...common, kind: z.literal('draw'), lot: line(LOT_MAX).optional() }),
  z.strictObject({ ...common, kind: z.literal('move'), toVesselId: Id, lossLitres: litresOrNone(WORKING_LITRES_MAX).optional() }),
  z.strictObject({ ...common, kind: z.literal('loss'), reason: z.enum(LOSS_REASONS) }),
  z.strictObject({ ...common, kind: z.literal('sample') }),
  z.strictObject({ ...common, kind: z.literal('addition') }),
], { error: `Say what it is: ${MOVEMENT_KINDS.join(', ')}.` })
export type MovementInput = z.output<typeof MovementInput>

export const MOVEMENTS_OF_AN_ACT_MAX = 200

export const ActInput = z.strictObject({
  id: Id,
  note: lines(NOTE_MAX).optional(),
  /** The planned draw that this act makes; null for an extra one. */
  drawId: Id.nullable().optional(),
  /** The duty that this act does. */
  dutyId: Id.optional(),
  movements: z.array(MovementInput).min(1, { error: 'An act has at least one movement.' }).max(MOVEMENTS_OF_AN_ACT_MAX),
})
export type ActInput = z.output<typeof ActInput>

/** How a vessel stands before and after something was recorded or struck out, today. */
export const VesselChangeView = z.object({
  vesselId: Id,
  before: z.object({ litres: z.number(), meanAgeDays: z.number().nullable() }),
  after: z.object({ litres: z.number(), meanAgeDays: z.number().nullable(), volumeDoubt: z.boolean(), overBrim: z.boolean() }),
})
export type VesselChangeView = z.output<typeof VesselChangeView>

export const ReversalView = z.object({ id: Id, movementId: Id, reason: z.string(), reversedAt: Instant, reversedById: Id, reversedByName: z.string() })
export type ReversalView = z.output<typeof ReversalView>

export const MovementView = z.object({
  id: Id,
  actId: Id,
  position: z.int(),
  kind: z.enum(MOVEMENT_KINDS),
  vesselId: Id,
  vesselName: z.string(),
  litres: z.number(),
  occurredOn: CivilDate,
  placeInDay: z.int(),
  method: z.enum(METHOD_NAMES).nullable(),
  note: z.string().nullable(),
  brew: z.object({ id: Id, code: z.string(), brewedOn: CivilDate }).nullable(),
  lot: z.string().nullable(),
  toVesselId: Id.nullable(),
  toVesselName: z.string().nullable(),
  lossLitres: z.number().nullable(),
  reason: z.enum(LOSS_REASONS).nullable(),
  reversal: ReversalView.nullable(),
})
export type MovementView = z.output<typeof MovementView>

export const ActView = z.object({
  id: Id,
  note: z.string().nullable(),
  recordedAt: Instant,
  recordedById: Id,
  recordedByName: z.string(),
  movements: z.array(MovementView),
})
export type ActView = z.output<typeof ActView>

/** What recording or striking out answers with: the rows, and what they changed. */
export const ActRecorded = ActView.extend({ changed: z.array(VesselChangeView) })
export type ActRecorded = z.output<typeof ActRecorded>

export const ReverseInput = z.strictObject({ id: Id, reason: line(REASON_MAX) })
export type ReverseInput = z.output<typeof ReverseInput>
export const MovementReversed = ReversalView.extend({ changed: z.array(VesselChangeView) })
export type MovementReversed = z.output<typeof MovementReversed>
export const ActReversed = z.object({ reversals: z.array(ReversalView), changed: z.array(VesselChangeView) })
export type ActReversed = z.output<typeof ActReversed>

/** The ledger of one vessel, newest first: its movements in their acts, and its notes. */
export const VesselLedger = z.object({
  movements: z.array(MovementView),
  notes: z.array(z.object({ id: Id, notedOn: CivilDate, text: z.string() })),
  acts: z.array(z.object({ id: Id, note: z.string().nullable(), recordedAt: Instant, recordedByName: z.string() })),
})
export type VesselLedger = z.output<typeof VesselLedger>

export const ImportQuery = z.strictObject({ dryRun: z.enum(['true', 'false', '1', '0', '']).optional() })
export const LineFault = z.object({ line: z.int(), column: z.string(), message: z.string() })
export type LineFault = z.output<typeof LineFault>
export const ImportReport = z.object({
  /** Lines of the file that say something, its head left out. */
  lines: z.int(),
  movements: z.int(),
  brews: z.int(),
  notes: z.int(),
  reversals: z.int(),
  /** Whether it was kept. */
  kept: z.boolean(),
  /** The first thousand of what is wrong, by line. */
  errors: z.array(LineFault),
  /** How many more there are. */
  moreErrors: z.int(),
})
export type ImportReport = z.output<typeof ImportReport>
