import type { VesselKind } from '#shared/cellar/vessel'
import type { ActKind } from './actFields'

const TWO_PEOPLE_LITRES = 600

export interface Caution { title: string, sentence: string }

/** Where people can be hurt by an act on a vessel. */
export function cautionOf(kind: VesselKind, act: ActKind, litres: number): Caution {
  const gas = 'Carbon dioxide gathers low in the room: ventilate before and while you work, and leave at once if you feel dizzy.'
  const two = litres > TWO_PEOPLE_LITRES ? ' Two people.' : ''
  if (kind === 'keg' || kind === 'steel') return { title: 'Pressure, gas, pumps.', sentence: `Let all pressure off and see the gauge at nought before anything is opened; keep the vent open while beer moves, or the vessel can burst or be sucked in. ${gas}${two}` }
  if (kind === 'glassCarboy') return { title: 'Glass, weight, gas.', sentence: `Never lift it full by its neck, never put it under pressure; wear gloves and eye protection, and let two carry it. ${gas}` }
  if (kind === 'plasticCarboy') return { title: 'Weight, gas.', sentence: `Let two carry it when it is full. ${gas}` }
  const lifting = act === 'move' ? ' Do not roll or lift a full cask alone.' : ''
  return { title: 'Gas, vacuum, pumps.', sentence: `Open the vent before anything moves. ${gas}${lifting}${two}` }
}

export const RULES_FIRST = 'Follow your site rules, local law and the product’s own label; ask a licensed or qualified person if unsure.'
