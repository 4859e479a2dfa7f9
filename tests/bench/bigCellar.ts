import { v7 as newId } from 'uuid'
import { civilDateOf } from '../../shared/cellar/civilDate'
import { writeLedgerFile } from '../../server/ledgerFile/write'
import type { Visitor } from '../support/visitor'
import { bigLedger } from './replay'

const FIRST_DAY = 17_700

/** Sixty vessels with eight years behind them, drawn from twice a year, brought in through the front door. */
export async function fillBigCellar(owner: Visitor): Promise<void> {
  for (let vessel = 0; vessel < 60; vessel++) await owner.post('/api/vessels', { id: newId(), name: `vessel ${vessel}`, kind: vessel % 3 ? 'barrel' : 'vat', workingLitres: 1000 })
  const file = writeLedgerFile(bigLedger(60, 8, 2).map(line => ({
    date: civilDateOf(FIRST_DAY + line.day), act: line.kind, vessel: line.vesselId, litres: line.litres,
    target: line.brewId ?? line.toVesselId ?? null, brewed: line.brewId ? civilDateOf(FIRST_DAY + line.day) : null, lossOnWay: line.lossLitres ?? null, reason: line.kind === 'loss' ? 'evaporation' : null,
  })))
  const reply = await owner.request('POST', '/api/ledger/import', { body: file, headers: { 'content-type': 'text/csv' } })
  if (reply.status !== 200) throw new Error(`the big ledger was not taken: ${reply.text.slice(0, 300)}`)
}

/** The median time in which the server sends a page, asked one request at a time. */
export async function medianMillis(owner: Visitor, path: string): Promise<number> {
  const times: number[] = []
  for (let n = 0; n < 25; n++) {
    const started = performance.now()
    const { status } = await owner.get(path, { accept: 'text/html' })
    if (status !== 200) throw new Error(`${path} was answered ${status}`)
    times.push(performance.now() - started)
  }
  return times.slice(5).sort((a, b) => a - b)[10] ?? NaN
}
