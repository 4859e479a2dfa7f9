/** The columns of a ledger file, as they are written out. Those of the second line may be left out of a file that is read in. */
export const COLUMNS = [
  'date', 'act', 'vessel', 'litres', 'target', 'brewed', 'lossOnWay', 'reason', 'method', 'ageBand', 'note',
  'beer', 'id', 'actId', 'actNote', 'placeInDay', 'position', 'reverses',
] as const
export type Column = (typeof COLUMNS)[number]

/** Without these a line cannot be understood. */
export const NEEDED: readonly Column[] = ['date', 'act', 'vessel']

/** What a head may be called besides. `kind` frees the word `act` for the id of the act that a line belongs to. */
const OTHER_HEADS: Readonly<Record<string, Column>> = { kind: 'act', actid: 'actId', lossonway: 'lossOnWay', ageband: 'ageBand', actnote: 'actNote', placeinday: 'placeInDay' }

/** Which column stands at which place, told by the file's head. Null for a head that is none of ours. */
export function columnsOf(head: readonly string[]): (Column | null)[] {
  const names = head.map(name => name.trim().toLowerCase())
  const hasKind = names.includes('kind')
  return names.map((name) => {
    if (name === 'act' && hasKind) return 'actId'
    return OTHER_HEADS[name] ?? COLUMNS.find(column => column.toLowerCase() === name) ?? null
  })
}
