import { createHash } from 'node:crypto'
import type { ImportReport, LineFault } from '#shared/schemas/ledger'
import { Fault } from '#shared/types/fault'
import { readLedgerFile, type Progress } from '#server/ledgerFile/read'
import { audit } from './audit'
import { readCellarState } from './cellarState'
import { importFaults } from './importRules'
import { importRowsOf } from './importRows'
import { keepImport } from './keepImport'
import type { Work } from './work'

/** So many faults are told one by one; more help nobody. */
const TOLD = 1_000

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
  if (faults.length > 0) return refused(counted, faults, dryRun)
  const clashes = await keepImport(work, rows, { dryRun })
  if (clashes.length > 0) return refused(counted, clashes, dryRun)
  if (!dryRun) await audit(work, { action: 'ledger.imported', detail: counted })
  return { ...counted, kept: !dryRun, errors: [], moreErrors: 0 }
}

/** A dry run says what is wrong; the real thing is refused for it, in the same words. */
function refused(counted: Omit<ImportReport, 'kept' | 'errors' | 'moreErrors'>, faults: readonly LineFault[], dryRun: boolean): ImportReport {
  const errors = [...faults].sort((a, b) => a.line - b.line).slice(0, TOLD)
  const report = { ...counted, kept: false, moreErrors: faults.length - errors.length }
  if (dryRun) return { ...report, errors }
  const bad = new Set(faults.map(fault => fault.line)).size
  throw new Fault('invalid', `${bad === 1 ? 'One line' : `${bad} lines`} cannot be taken, so none was.`, { errors: errors.map(({ line, column, message }) => ({ field: column, line, column, message })), members: report })
}
