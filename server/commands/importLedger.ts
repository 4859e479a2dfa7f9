import { createHash } from 'node:crypto'
import type { ImportReport } from '#shared/schemas/ledger'
import { Fault } from '#shared/types/fault'
import { readLedgerFile, type Progress } from '#server/ledgerFile/read'
import { audit } from './audit'
import { readCellarState } from './cellarState'
import { importFaults } from './importRules'
import { importRowsOf } from './importRows'
import { keepImport } from './keepImport'
import type { Work } from './work'

export interface ImportOptions {
  /** Only say what would be kept and what is wrong. */
  dryRun: boolean
  progress?: Progress
}

/**
 * Take in a ledger file: all of it or nothing, and a word for every line that cannot be taken. Lines that are kept
 * already under their ids are passed over, so that a file can be sent twice.
 */
export async function importLedger(work: Work, text: string, { dryRun, progress }: ImportOptions): Promise<ImportReport> {
  const file = await readLedgerFile(text, progress)
  const state = await readCellarState(work.tx, work.brewery.id)
  const faults = file.faults.length > 0 && file.lines.length === 0 ? file.faults : [...file.faults, ...importFaults(file.lines, state, work.today)]
  const rows = importRowsOf(work, file.lines, state, createHash('sha256').update(text).digest('hex'))
  const counted = { lines: file.count, movements: rows.movements.length, brews: rows.brews.length, notes: rows.notes.length, reversals: rows.reversals.length }
  if (faults.length > 0) return refused({ ...counted, kept: false, errors: inOrder(faults) }, dryRun)
  const clashes = await keepImport(work, rows, { dryRun })
  if (clashes.length > 0) return refused({ ...counted, kept: false, errors: inOrder(clashes) }, dryRun)
  if (!dryRun) await audit(work, { action: 'ledger.imported', detail: counted })
  return { ...counted, kept: !dryRun, errors: [] }
}

/** A dry run says what is wrong; the real thing is refused for it, in the same words. */
function refused(report: ImportReport, dryRun: boolean): ImportReport {
  if (dryRun) return report
  const { errors, ...counted } = report
  const count = errors.length === 1 ? 'One line' : `${errors.length} lines`
  throw new Fault('invalid', `${count} cannot be taken, so none was.`, { errors: errors.map(({ line, column, message }) => ({ field: column, line, column, message })), members: counted })
}

function inOrder(faults: ImportReport['errors']): ImportReport['errors'] {
  return [...faults].sort((a, b) => a.line - b.line)
}
