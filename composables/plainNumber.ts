// A narrow space divides thousands; an ordinary one may be a slip, and is left for the server to speak of.
const NARROW_SPACES = /[\u00A0\u2009\u202F]/g
const PLAIN = /^-?\d+(?:[.,]\d+)?$/
// As we write thousands ourselves. Read as a decimal comma, 4,000 litres would silently become four.
const THOUSANDS = /^-?\d{1,3},\d{3}$/

/** What a person typed into a field of figures: a number if it is one plain decimal, else the text itself, so that the answer can say what is wrong. */
export function plainNumber(text: string): number | string {
  const figures = text.trim().replace(NARROW_SPACES, '')
  return PLAIN.test(figures) && !THOUSANDS.test(figures) ? Number(figures.replace(',', '.')) : text
}
