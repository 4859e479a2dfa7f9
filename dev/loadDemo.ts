import { readFile } from 'node:fs/promises'
import { fileURLToPath } from 'node:url'
import { v7 as newId } from 'uuid'
import type { Role } from '#shared/abilities'
import { addDays, civilDateIn, daysBetween, mondayOf } from '#shared/cellar/civilDate'
import { addToCrew } from '#server/commands/addToCrew'
import { closeDays } from '#server/commands/closeDays'
import { createBeer } from '#server/commands/createBeer'
import { createVessel } from '#server/commands/createVessel'
import { foundBrewery } from '#server/commands/foundBrewery'
import { importLedger } from '#server/commands/importLedger'
import { recordResize, recordVesselEvent } from '#server/commands/recordVesselEvent'
import { writeLedgerFile } from '#server/ledgerFile/write'
import type { Tx } from '#server/database/client'
import { openDatabase } from '#server/database/client'
import { withoutBrewery } from '#server/database/door'
import { anyBrewery, userByEmail } from '#server/database/queries/people'
import { hashPassword } from '#server/security/passwords'
import { DemoCellar, type BreweryFile } from './demoCellar'

/** Everybody in the demo signs in with this. That is why the demo is loaded on loopback only. */
export const DEMO_PASSWORD = 'sallowmere-cellar'

export interface SignInLine {
  email: string
  role: Role
  brewery: string
}

export interface LoadOptions {
  databaseUrl: string
  now: Date
  demoFolder?: string
}

/** Load the demo's breweries into an empty database, with the commands that a user's own data goes through. Does nothing where a brewery is already. */
export async function loadDemo({ databaseUrl, now, demoFolder = fileURLToPath(new URL('.', import.meta.url)) }: LoadOptions): Promise<{ loaded: boolean, signIns: SignInLine[] }> {
  const demo = DemoCellar.parse(JSON.parse(await readFile(`${demoFolder}/cellar.json`, 'utf8')))
  const ledger = await readFile(`${demoFolder}/ledger.csv`, 'utf8')
  const signIns = [demo, demo.second].flatMap(file => file.people.map(({ email, role }) => ({ email, role, brewery: file.brewery.name })))
  const database = openDatabase(databaseUrl, { connections: 2 })
  try {
    const state = await withoutBrewery(database, async tx => ({
      empty: !await anyBrewery(tx),
      isDemo: await userByEmail(tx, signIns[0]?.email ?? '') !== undefined,
    }))
    if (!state.empty) return { loaded: false, signIns: state.isDemo ? signIns : [] }
    const passwordHash = await hashPassword(DEMO_PASSWORD)
    await withoutBrewery(database, async (tx) => {
      const shiftDays = weeksBetween(demo.demoDay, civilDateIn(demo.brewery.timeZone, now.getTime()))
      await loadBrewery(tx, demo, ledger, { now, shiftDays, passwordHash })
      await loadBrewery(tx, demo.second, writeLedgerFile(demo.second.ledger), { now, shiftDays, passwordHash })
    })
    return { loaded: true, signIns }
  }
  finally {
    await database.close()
  }
}

/** By how many days the demo moves, in whole weeks, so that its own day falls into the week of `today`. */
export function weeksBetween(demoDay: string, today: string): number {
  return daysBetween(mondayOf(demoDay), mondayOf(today))
}

/** Every day that stands in a text, moved; codes and names of runs are no days. */
function moveDays(text: string, shiftDays: number): string {
  return text.replace(/\b\d{4}-\d{2}-\d{2}\b/g, date => addDays(date, shiftDays))
}

const MONTHS = ['January', 'February', 'March', 'April', 'May', 'June', 'July', 'August', 'September', 'October', 'November', 'December']

/** Days that are told in words, `21 September`, moved with the year of the day on which they were told. */
export function moveSpokenDays(text: string, toldOn: string, shiftDays: number): string {
  return text.replace(new RegExp(`\\b(\\d{1,2}) (${MONTHS.join('|')})\\b`, 'g'), (_, day: string, month: string) => {
    const moved = addDays(`${toldOn.slice(0, 4)}-${String(MONTHS.indexOf(month) + 1).padStart(2, '0')}-${day.padStart(2, '0')}`, shiftDays)
    return `${Number(moved.slice(8))} ${MONTHS[Number(moved.slice(5, 7)) - 1]}`
  })
}

async function loadBrewery(tx: Tx, file: BreweryFile, ledger: string, { now, shiftDays, passwordHash }: { now: Date, shiftDays: number, passwordHash: string }): Promise<void> {
  const owner = file.people.find(person => person.role === 'owner')
  if (!owner) throw new Error(`the demo's ${file.brewery.name} has no owner`)
  const { name: breweryName, timeZone, sendAt, closedDays } = file.brewery
  const work = await foundBrewery(tx, { breweryName, timeZone, sendAt, owner: { name: owner.name, email: owner.email, passwordHash } }, now)

  for (const { name, email, role, accessUntil } of file.people.filter(person => person !== owner)) {
    await addToCrew(work, { name, email, role, passwordHash, accessUntil: accessUntil === null ? null : addDays(accessUntil, shiftDays) })
  }
  // The days that a brewery is closed every year stay where the calendar has them.
  for (const days of closedDays) await closeDays(work, days)

  const beerIds = new Map<string, string>()
  for (const beer of file.beers) beerIds.set(beer.code, (await createBeer(work, beer)).id)
  const vesselIds = new Map<string, string>()
  for (const { beer, ...vessel } of file.vessels) {
    const made = await createVessel(work, { id: newId(), ...vessel }, beer === null ? null : beerIds.get(beer) ?? null)
    vesselIds.set(vessel.name, made.vessel.id)
  }
  const idOf = (vessel: string) => vesselIds.get(vessel) ?? ''

  await importLedger(work, moveDays(ledger, shiftDays), { dryRun: false })
  for (const { vessel, on, fromLitres, toLitres } of file.resizes) await recordResize(work, idOf(vessel), addDays(on, shiftDays), fromLitres, toLitres)
  for (const { vessel, on, kind, reason } of file.vesselEvents) await recordVesselEvent(work, idOf(vessel), { id: newId(), kind, occurredOn: addDays(on, shiftDays), reason: moveSpokenDays(reason, on, shiftDays) })
}
