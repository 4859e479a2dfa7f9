import { stringify } from 'csv-stringify/sync'
import { COLUMNS, type Column } from './columns'
import { inert } from './inert'

/** A line as it is written: numbers stay numbers, text that looks like a formula is made inert. */
export type WrittenLine = Partial<Record<Column, string | number | null>>

/** A ledger file: `;` between cells, a decimal point, one line a movement, note or reversal, in ledger order. */
export function writeLedgerFile(lines: readonly WrittenLine[]): string {
  const rows = lines.map(line => COLUMNS.map((column) => {
    const value = line[column] ?? ''
    return typeof value === 'number' ? String(value) : inert(value)
  }))
  return stringify([[...COLUMNS], ...rows], { delimiter: ';', record_delimiter: '\r\n' })
}
