// What a spreadsheet would take for a formula if a cell began with it.
const RISKY = /^'*[=+\-@\t\r＝＋－＠]/
const GUARDED = /^'+[=+\-@\t\r＝＋－＠]/

/** A text as it may stand in a file that a spreadsheet opens: one that looks like a formula gets an apostrophe before it. */
export function inert(text: string): string {
  return RISKY.test(text) ? `'${text}` : text
}

/** The text behind `inert()`. */
export function fromInert(text: string): string {
  return GUARDED.test(text) ? text.slice(1) : text
}
