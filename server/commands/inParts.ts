/** Rows a statement: large enough to be quick, small enough for its timeout and for the 65,535 values that it may have. */
const AT_ONCE = 4_000

/** A long list cut into parts that one statement can take. */
export function inParts<Row>(rows: readonly Row[]): Row[][] {
  return Array.from({ length: Math.ceil(rows.length / AT_ONCE) }, (_, part) => rows.slice(part * AT_ONCE, (part + 1) * AT_ONCE))
}
