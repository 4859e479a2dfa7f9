import type { MovementView } from '#shared/schemas/ledger'
import type { StackView } from '#shared/schemas/stack'
import { sumOf } from './cohorts'
import type { StackCohort } from './cohorts'
import { changeIn } from './ledgerLines'
import { dayWords, litreWords, oneDecimal } from './vesselWords'

const LARGEST = 3
const THREE_YEARS = 1_096

/** How the mean age of a stack came about, with its weightiest terms. */
export function meanWords({ cohorts, meanAgeDays }: StackView): string[] {
  const beer = sumOf(cohorts, ({ litres }) => litres)
  const heavy = [...cohorts].sort((a, b) => b.litres * b.ageDays - a.litres * a.ageDays).slice(0, LARGEST)
  const others = cohorts.length - heavy.length
  const terms = heavy.map(({ brewCode, litres, ageDays }) => `${brewCode} ${litreWords(oneDecimal(litres))} × ${dayWords(ageDays)}`)
  const all = sumOf(cohorts, ({ litres, ageDays }) => litres * ageDays)
  return [
    'Each brew’s litres times its age since the brew day, added up, divided by all the beer.',
    `${terms.join(', ')}${others > 0 ? ` and ${others} more` : ''} come to ${Math.round(all).toLocaleString('en-GB')} litre-days; ÷ ${litreWords(oneDecimal(beer))} = ${dayText(meanAgeDays)}.`,
  ]
}

/** How an age was found that a share of the beer is younger than. */
export function percentileWords(stack: StackView): string[] {
  const told = [['A tenth', 0.1, stack.p10AgeDays], ['Half', 0.5, stack.p50AgeDays], ['Nine tenths', 0.9, stack.p90AgeDays]] as const
  const beer = sumOf(stack.cohorts, ({ litres }) => litres)
  return [
    'From the youngest brew on, litres are added up until so much of the beer is reached; the age of the brew that reaches it is told.',
    told.map(([words, share, days]) => `${words} is ${litreWords(oneDecimal(beer * share))}: reached with ${namesAt(stack.cohorts, days)}, ${dayWords(days)}`).join('. ') + '.',
  ]
}

/** How much of the beer is three years old and more. */
export function overThreeWords({ cohorts, shareOver3Years }: StackView): string[] {
  const beer = sumOf(cohorts, ({ litres }) => litres)
  const old = cohorts.filter(({ ageDays }) => ageDays >= THREE_YEARS)
  const oldLitres = sumOf(old, ({ litres }) => litres)
  return [`${old.length === 1 ? 'One brew is' : `${old.length} brews are`} 1,096 days old or more; they hold ${litreWords(oneDecimal(oldLitres))} of ${litreWords(oneDecimal(beer))}: ${oneDecimal((shareOver3Years ?? 0) * 100)}\u00A0%.`]
}

/** How the litres in a vessel came about, by its lines up to a day. */
export function volumeWords(movements: readonly MovementView[], vesselId: string, { on, litres, volumeDoubt }: StackView): string[] {
  const changes = movements.filter(line => line.reversal === null && line.occurredOn <= on).map(line => changeIn(line, vesselId))
  const [into, out] = [changes.filter(change => change > 0), changes.filter(change => change < 0)]
  return [
    `${litreWords(oneDecimal(sumOf(into, change => change)))} came in by ${into.length} lines, ${litreWords(oneDecimal(-sumOf(out, change => change)))} went out by ${out.length}: ${litreWords(oneDecimal(litres))}. Lines struck out do not count.`,
    ...volumeDoubt ? ['At some line more went out than was there. It counts as emptied then, until the missing line is entered.'] : [],
  ]
}

/** How each share came about. */
export function shareWords({ litres }: StackView): string[] {
  return [
    `A draw or a loss takes the same part of every brew, a refill lies on top. What of a brew is left then, divided by the ${litreWords(oneDecimal(litres))} that are in it, is its share.`,
    'Ages count from the brew day. What is less than 0.01 % stands with the older rest.',
  ]
}

const namesAt = (cohorts: readonly StackCohort[], days: number | null) => cohorts.filter(({ ageDays }) => ageDays === days).map(({ brewCode }) => brewCode).join(' and ')
const dayText = (days: number | null) => days === null ? '–' : `${days.toFixed(1)}\u00A0d`
