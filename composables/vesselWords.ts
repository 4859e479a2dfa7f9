import type { VesselKind } from '#shared/cellar/vessel'
import { VESSEL_KINDS } from '#shared/cellar/vessel'
import type { VesselView } from '#shared/schemas/vessel'
import { DAYS_A_YEAR } from './plumbLine'
import { plainDate } from './civilDate'

/** What each kind of vessel is called. */
export const KIND_WORDS: Record<VesselKind, string> = {
  vat: 'Vat',
  puncheon: 'Puncheon',
  barrel: 'Barrel',
  steel: 'Steel tank',
  keg: 'Keg',
  glassCarboy: 'Glass carboy',
  plasticCarboy: 'Plastic carboy',
}

/** The kinds, in the order in which a form offers them. */
export const KIND_CHOICES = VESSEL_KINDS.map(value => ({ value, label: KIND_WORDS[value] }))

const FIGURES = new Intl.NumberFormat('en-GB', { maximumFractionDigits: 3 })
const TENTHS = new Intl.NumberFormat('en-GB', { minimumFractionDigits: 1, maximumFractionDigits: 1 })
const SMALL_NUMBERS = ['no', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine', 'ten', 'eleven', 'twelve', 'thirteen', 'fourteen', 'fifteen', 'sixteen', 'seventeen', 'eighteen', 'nineteen', 'twenty']

/** `4,000 L`, with a space that does not break. */
export function litreWords(litres: number): string {
  return `${FIGURES.format(litres)}\u00A0L`
}

/** `2.16 y`. */
export function yearWords(days: number): string {
  return `${(days / DAYS_A_YEAR).toFixed(2)}\u00A0y`
}

/** `788 d`, or a dash where there is no age. */
export function dayWords(days: number | null): string {
  return days === null ? '–' : `${FIGURES.format(Math.round(days))}\u00A0d`
}

/** What is in a vessel: litres and mean age, or the word that it is empty. */
export function contentWords({ litres, meanAgeDays }: Pick<VesselView, 'litres' | 'meanAgeDays'>): string {
  if (litres === 0) return 'empty'
  return meanAgeDays === null ? litreWords(litres) : `${litreWords(litres)}, ${yearWords(meanAgeDays)}`
}

/** The cellar in one sentence, with the numbers that matter. */
export function cellarSentence(vessels: readonly VesselView[]): string {
  const room = sum(vessels.map(vessel => vessel.workingLitres))
  const filled = vessels.filter(vessel => vessel.litres > 0)
  const litres = sum(filled.map(vessel => vessel.litres))
  if (vessels.length === 1 && filled.length === 0) return `One vessel stands here, ${FIGURES.format(room)} litres of room; it is empty.`
  if (filled.length === 0) return `${capital(count(vessels.length))} vessels stand here, ${FIGURES.format(room)} litres of room; all are empty.`
  const age = sum(filled.map(vessel => vessel.litres * (vessel.meanAgeDays ?? 0))) / litres / DAYS_A_YEAR
  const empty = vessels.length - filled.length
  const rest = empty === 0 ? '' : ` ${capital(count(empty))} ${empty === 1 ? 'is' : 'are'} empty.`
  return `${FIGURES.format(Math.round(litres))} litres in ${count(vessels.length)} ${vessels.length === 1 ? 'vessel' : 'vessels'}, ${age.toFixed(2)} years old on average.${rest}`
}

/** The sentence that stands for the drawing of a vessel. */
export function figureSentence(vessel: Pick<VesselView, 'name' | 'kind' | 'wood' | 'workingLitres' | 'litres' | 'meanAgeDays' | 'cohortCount' | 'oldestCohort'>): string {
  const made = vessel.wood ? 'of wood' : madeOf(vessel.kind)
  const holds = vessel.litres === 0 ? 'empty' : `holding ${contentWords(vessel)}`
  const oldest = vessel.oldestCohort === null
    ? ''
    : ` ${capital(count(vessel.cohortCount))} ${vessel.cohortCount === 1 ? 'brew' : 'brews'}, the oldest ${vessel.oldestCohort.brewCode} of ${plainDate(vessel.oldestCohort.brewedOn)}.`
  return `${vessel.name}: ${KIND_WORDS[vessel.kind].toLowerCase()} ${made}, room for ${litreWords(vessel.workingLitres)}, ${holds}.${oldest}`
}

function madeOf(kind: VesselKind): string {
  if (kind === 'glassCarboy') return 'of glass'
  return kind === 'plasticCarboy' ? 'of plastic' : 'of steel'
}

/** What stands beside a standing: why, and what else goes on in the vessel. */
export function besideStanding({ standing, standingReason, fruiting, gravityWatch }: Pick<VesselView, 'standing' | 'standingReason' | 'fruiting' | 'gravityWatch'>): string[] {
  // A verdict tells of the draw to come, which has a line of its own.
  const reason = standing === 'called' ? null : standingReason
  return [reason, fruiting ? 'on fruit' : null, gravityWatch ? 'gravity watch' : null].filter(words => words !== null)
}

/** What is not as it should be with a vessel's volume, each in words. */
export function volumeFaults({ volumeDoubt, overBrim }: Pick<VesselView, 'volumeDoubt' | 'overBrim'>): string[] {
  return [volumeDoubt ? 'volume in doubt' : null, overBrim ? 'over its brim' : null].filter(words => words !== null)
}

function count(number: number): string {
  return SMALL_NUMBERS[number] ?? FIGURES.format(number)
}

function capital(word: string): string {
  return word.charAt(0).toUpperCase() + word.slice(1)
}

function sum(numbers: readonly number[]): number {
  return numbers.reduce((total, number) => total + number, 0)
}

/** Cut to a tenth, as litres, days and shares are told. */
export function oneDecimal(number: number): number {
  return Math.round(number * 10) / 10
}

/** `1,000.0`, for columns of litres. */
export function litreColumn(litres: number): string {
  return TENTHS.format(litres)
}

/** `Vessel 1, vat of wood, room for 4,000 L`. */
export function vesselLine({ walkingOrder, kind, wood, workingLitres }: Pick<VesselView, 'walkingOrder' | 'kind' | 'wood' | 'workingLitres'>): string {
  return `Vessel ${walkingOrder}, ${KIND_WORDS[kind].toLowerCase()} ${wood ? 'of wood' : madeOf(kind)}, ${litreWords(workingLitres)}`
}
