/** What a vessel can be made as. The face draws each in its own shape. */
export const VESSEL_KINDS = ['vat', 'puncheon', 'barrel', 'steel', 'keg', 'glassCarboy', 'plasticCarboy'] as const
export type VesselKind = (typeof VESSEL_KINDS)[number]

/** The one plain word for how a vessel is now. Derived from events, never typed. */
export const STANDINGS = ['resting', 'steerTasteDue', 'drawTasteDue', 'called', 'held', 'drawnOpen', 'settling', 'setApart', 'soaking', 'dry', 'away', 'retired'] as const
export type Standing = (typeof STANDINGS)[number]

export const VESSEL_NAME_MAX = 60
/** Litres. The column holds twelve digits, three of them behind the point. */
export const WORKING_LITRES_MAX = 999_999_999.999
export const WALKING_ORDER_MAX = 9_999

const WOODEN: readonly VesselKind[] = ['vat', 'puncheon', 'barrel']

/** Whether a vessel of this kind is of wood unless said otherwise. Common practice, no source. */
export function usuallyWooden(kind: VesselKind): boolean {
  return WOODEN.includes(kind)
}
