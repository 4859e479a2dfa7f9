import { WORKING_LITRES_MAX } from '#shared/cellar/vessel'
import { CivilDate, thousandths } from '#shared/schemas/fields'

/** A cell that cannot be taken, in words. */
export class CellFault extends Error {}

/**
 * A number as people write it in a table: decimal point or decimal comma, spaces between thousands. A comma before just
 * three figures can be read two ways and is asked back, for a thousandfold error is worse than a question.
 */
export function numberOf(text: string): number {
  const tight = text.replace(/[\s\u00A0\u202F]/g, '')
  if (/^\d{1,3},\d{3}$/.test(tight) && !tight.startsWith('0,')) throw new CellFault(`${text} can be read two ways: write ${tight.replace(',', '')} or ${tight.replace(',', '.')}.`)
  if (!/^-?\d+([.,]\d+)?$/.test(tight)) throw new CellFault(`${text} is not a number.`)
  return Number(tight.replace(',', '.'))
}

/** Litres above nought, three decimals at most. */
export function litresOf(text: string): number {
  const litres = numberOf(text)
  if (litres <= 0) throw new CellFault('Litres are above nought.')
  return fine(litres)
}

/** Litres of nought or more. */
export function lossOf(text: string): number {
  const litres = numberOf(text)
  if (litres < 0) throw new CellFault('Less than nothing cannot be lost.')
  return fine(litres)
}

/** A whole number within bounds. */
export function wholeOf(text: string, least: number, most: number): number {
  const value = numberOf(text)
  if (!Number.isInteger(value) || value < least || value > most) throw new CellFault(`Write a whole number from ${least} to ${most}.`)
  return value
}

/** A day of the calendar. */
export function dateOf(text: string): string {
  if (!CivilDate.safeParse(text).success) throw new CellFault(`${text} is not a day of the calendar; write it as 2026-09-14.`)
  return text
}

/** One of a list of words, in any case. */
export function wordOf<Word extends string>(text: string, words: readonly Word[]): Word {
  const found = words.find(word => word.toLowerCase() === text.toLowerCase())
  if (found === undefined) throw new CellFault(`${text} is none of: ${words.join(', ')}.`)
  return found
}

/** A text of at most so many signs, without signs that cannot be kept. */
export function textOf(text: string, most: number): string {
  if (text.length > most) throw new CellFault(`Use ${most} signs at most.`)
  if (!text.isWellFormed() || /[^\P{Cc}\n\t]/u.test(text)) throw new CellFault('There is a sign in this that cannot be kept.')
  return text
}

/** An id of RFC 9562. */
export function idOf(text: string): string {
  if (!/^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/i.test(text)) throw new CellFault('This is not an id.')
  return text.toLowerCase()
}

function fine(litres: number): number {
  if (litres > WORKING_LITRES_MAX) throw new CellFault('So much fits into no cellar.')
  if (litres !== thousandths(litres)) throw new CellFault('Litres have three decimals at most.')
  return litres
}
