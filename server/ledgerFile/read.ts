import { parse, CsvError } from 'csv-parse'
import type { LineFault } from '#shared/schemas/ledger'
import { columnsOf, NEEDED, type Column } from './columns'
import { readLine, type Cells, type FileLine } from './line'

export interface LedgerFile {
  lines: FileLine[]
  faults: LineFault[]
  /** Lines that say something, the head left out. */
  count: number
}

/** How often a long reading lets others have their turn, in lines. */
const TURN = 500

/** Told how far a long work has come. */
export type Progress = (line: number) => void

/** Read a ledger file: separators `;`, `,` or tab, quoted as RFC 4180, with or without a byte order mark. Faults are told line by line, up to the end. */
export async function readLedgerFile(text: string, progress: Progress = () => {}): Promise<LedgerFile> {
  const file: LedgerFile = { lines: [], faults: [], count: 0 }
  let columns: (Column | null)[] | null = null
  let next = 1
  try {
    for await (const { record, info } of parse(text, optionsFor(text))) {
      const line = next
      next = Number(info.lines) + 1
      const cells: string[] = record
      if (columns === null) {
        columns = columnsOf(cells)
        file.faults.push(...headFaults(cells, columns))
        if (file.faults.length > 0) return file
        continue
      }
      if (cells.every(cell => cell.trim() === '')) continue
      file.count++
      const found = readLine(line, cellsOf(columns, cells))
      if ('read' in found) file.lines.push(found.read)
      else file.faults.push(...found.faults)
      if (file.count % TURN === 0) {
        progress(line)
        await new Promise(resolve => setImmediate(resolve))
      }
    }
  }
  catch (error) {
    if (!(error instanceof CsvError)) throw error
    file.faults.push({ line: await firstLineAfter(text, Number(error.records)), column: '', message: 'This line is not written as CSV: look for a quotation mark that is opened and not closed.' })
  }
  if (columns === null && file.faults.length === 0) file.faults.push({ line: 1, column: '', message: 'The file is empty.' })
  return file
}

const optionsFor = (text: string) => ({ bom: true, delimiter: separatorOf(text), info: true as const, relax_column_count: true })

/** The line on which the record after so many whole ones begins: where a quotation mark was opened that nothing closes. */
async function firstLineAfter(text: string, records: number): Promise<number> {
  let lines = 0
  if (records > 0) for await (const { info } of parse(text, { ...optionsFor(text), to: records })) lines = Number(info.lines)
  return lines + 1
}

function separatorOf(text: string): string {
  const head = text.slice(0, 2000).split(/\r?\n/, 1)[0] ?? ''
  const counted = [';', ',', '\t'].map(separator => ({ separator, count: head.split(separator).length }))
  return counted.reduce((most, one) => one.count > most.count ? one : most).separator
}

function headFaults(head: readonly string[], columns: readonly (Column | null)[]): LineFault[] {
  const unknown = head.filter((name, at) => columns[at] === null && name.trim() !== '')
  const missing = NEEDED.filter(column => !columns.includes(column))
  const twice = columns.filter((column, at) => column !== null && columns.indexOf(column) !== at)
  return [
    ...unknown.map(name => ({ line: 1, column: name.slice(0, 60), message: 'No column of a ledger has this head.' })),
    ...missing.map(column => ({ line: 1, column, message: 'This column is needed.' })),
    ...twice.map(column => ({ line: 1, column: column ?? '', message: 'This head stands twice.' })),
  ]
}

function cellsOf(columns: readonly (Column | null)[], record: readonly string[]): Cells {
  const cells: Cells = {}
  columns.forEach((column, at) => {
    if (column !== null) cells[column] = record[at] ?? ''
  })
  return cells
}
