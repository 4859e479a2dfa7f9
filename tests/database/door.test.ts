import { sql } from 'drizzle-orm'
import pg from 'pg'
import { v7 as newId } from 'uuid'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { openDatabase, type Database, type Tx } from '../../server/database/client'
import { databaseCode, withBrewery, withoutBrewery, withSession } from '../../server/database/door'
import { vessels } from '../../server/database/schema'
import { freshDatabase, type TestDatabase } from '../support/database'

let db: TestDatabase
let sallowmere: string
let quernhollow: string
let tenantTables: string[]
beforeAll(async () => {
  db = await freshDatabase({ demo: true, connections: 2 })
  const rows = await db.asSuperuser<{ id: string, name: string }>('select id, name from breweries')
  sallowmere = rows.find(row => row.name === 'Sallowmere Brewing')?.id ?? ''
  quernhollow = rows.find(row => row.name === 'Quernhollow')?.id ?? ''
  tenantTables = (await db.asSuperuser<{ table_name: string }>(`select table_name from information_schema.columns where table_schema = 'public' and column_name = 'brewery_id' and is_nullable = 'NO'`)).map(row => row.table_name)
})
afterAll(() => db?.drop())

const count = async (tx: Tx, table: string) => (await tx.execute<{ n: number }>(sql`select count(*)::int as n from ${sql.identifier(table)}`)).rows[0]?.n
const breweriesSeen = async (tx: Tx) => (await tx.selectDistinct({ id: vessels.breweryId }).from(vessels)).map(row => row.id)

describe('without a setting', () => {
  it('the application’s role sees no row of any tenant table', async () => {
    const client = new pg.Client({ connectionString: db.urls.app })
    await client.connect()
    try {
      for (const table of tenantTables) {
        expect((await client.query(`select * from ${table}`)).rows, table).toEqual([])
      }
    }
    finally {
      await client.end()
    }
  })

  it('the door for shared tables shows none either', async () => {
    for (const table of tenantTables) {
      expect(await withoutBrewery(db.database, tx => count(tx, table)), table).toBe(0)
    }
  })
})

describe('with one brewery open', () => {
  it('no row of the other is seen in any table, and the own ones are', async () => {
    for (const table of tenantTables) {
      const [real] = await db.asSuperuser<{ n: number }>(`select count(*)::int as n from ${table} where brewery_id = $1`, [quernhollow])
      expect(await withBrewery(db.database, { breweryId: quernhollow }, tx => count(tx, table)), table).toBe(real?.n)
    }
  })

  it('a row of the other is neither changed nor deleted nor made', async () => {
    const before = await db.asSuperuser(`select * from vessels where brewery_id = $1`, [sallowmere])
    await withBrewery(db.database, { breweryId: quernhollow }, async (tx) => {
      expect((await tx.execute(sql`update vessels set name = 'Stolen' where brewery_id = ${sallowmere}`)).rowCount).toBe(0)
      expect((await tx.execute(sql`delete from vessels where brewery_id = ${sallowmere}`)).rowCount).toBe(0)
    })
    const insert = withBrewery(db.database, { breweryId: quernhollow }, tx => tx.insert(vessels).values({
      breweryId: sallowmere, id: newId(), name: 'Planted', kind: 'keg', workingLitres: 10, wood: false, walkingOrder: 9, createdAt: new Date(0),
    }))
    expect(databaseCode(await insert.catch((error: unknown) => error))).toBe('42501')
    expect(await db.asSuperuser(`select * from vessels where brewery_id = $1`, [sallowmere])).toEqual(before)
  })

  it('a row may not be handed over to the other', async () => {
    const hand = withBrewery(db.database, { breweryId: quernhollow }, tx => tx.update(vessels).set({ breweryId: sallowmere }))
    expect(databaseCode(await hand.catch((error: unknown) => error))).toBe('42501')
  })

  it('a key that points across breweries is refused by the database itself', async () => {
    const [beer] = await db.asSuperuser<{ id: string }>('select id from beers where brewery_id = $1 limit 1', [sallowmere])
    await expect(db.asSuperuser('update vessels set beer_id = $1 where brewery_id = $2', [beer?.id, quernhollow])).rejects.toMatchObject({ code: '23503' })
  })
})

describe('over two connections', () => {
  it('two hundred interleaved transactions never see the other’s rows, also after errors', async () => {
    const seen = await Promise.all(Array.from({ length: 200 }, async (_, n) => {
      const breweryId = n % 2 ? sallowmere : quernhollow
      if (n % 7 === 0) {
        const failing = withBrewery(db.database, { breweryId }, tx => tx.execute(sql`select 1 / 0`))
        expect(databaseCode(await failing.catch((error: unknown) => error))).toBe('22012')
      }
      return [breweryId, await withBrewery(db.database, { breweryId }, breweriesSeen)]
    }))
    for (const [breweryId, found] of seen) expect(found).toEqual([breweryId])
  })

  it('nothing of a brewery stays on a connection after the door has closed', async () => {
    const one = openDatabase(db.urls.app, { connections: 1 })
    try {
      await withBrewery(one, { breweryId: sallowmere, personId: newId() }, breweriesSeen)
      await withBrewery(one, { breweryId: sallowmere }, () => Promise.reject(new Error('the work failed'))).catch(() => {})
      expect(await settingsOf(one)).toEqual({ brewery: '', person: '' })
    }
    finally {
      await one.close()
    }
  })

  it('a connection killed in the middle of its work is replaced, and the failure is named as passing', async () => {
    const killed = withBrewery(db.database, { breweryId: sallowmere }, async (tx) => {
      const { rows: [row] } = await tx.execute<{ pid: number }>(sql`select pg_backend_pid() as pid`)
      await db.asSuperuser('select pg_terminate_backend($1)', [row?.pid])
      await tx.execute(sql`select 1`)
    })
    await expect(killed).rejects.toMatchObject({ code: 'unavailable' })
    expect(await withBrewery(db.database, { breweryId: quernhollow }, breweriesSeen)).toEqual([quernhollow])
  })

  it('a session that is none opens no brewery', async () => {
    const seen = await withSession(db.database, '0'.repeat(64), new Date(), async (entered, tx) => [entered, await count(tx, 'vessels')])
    expect(seen).toEqual([null, 0])
  })
})

async function settingsOf(database: Database) {
  return withoutBrewery(database, async (tx) => {
    const { rows } = await tx.execute(sql`select current_setting('undercroft.brewery', true) as brewery, current_setting('undercroft.person', true) as person`)
    return rows[0]
  })
}
