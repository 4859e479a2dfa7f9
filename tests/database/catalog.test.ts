import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { freshDatabase, type TestDatabase } from '../support/database'

/** Tables whose rows belong to no brewery, each for a reason that DEVELOPERS.md gives. */
const SHARED_TABLES = ['breweries', 'sessions', 'sign_in_attempts', 'tokens', 'users']

/** Tables that are only ever added to. */
const APPEND_ONLY = ['acts', 'audit_events', 'ledger_notes', 'movements', 'reversals', 'vessel_events']

let db: TestDatabase
let tables: string[]
beforeAll(async () => {
  db = await freshDatabase({ demo: true })
  const rows = await db.asSuperuser<{ relname: string }>(`select relname from pg_class where relnamespace = 'public'::regnamespace and relkind in ('r', 'p') order by relname`)
  tables = rows.map(row => row.relname)
  // A trigger of a table without rows has nothing to refuse.
  await db.asSuperuser(`insert into reversals (brewery_id, id, movement_id, request_id, reason, reversed_at, reversed_by)
    select brewery_id, gen_random_uuid(), id, gen_random_uuid(), 'typed wrong', now(), (select id from users limit 1) from movements limit 1`)
})
afterAll(() => db?.drop())

const tenantTables = () => tables.filter(table => !SHARED_TABLES.includes(table))

describe('the catalog', () => {
  it('has a brewery_id in every table but the listed ones', async () => {
    const rows = await db.asSuperuser<{ table_name: string }>(`select table_name from information_schema.columns where table_schema = 'public' and column_name = 'brewery_id' and is_nullable = 'NO'`)
    expect(rows.map(row => row.table_name).sort()).toEqual(tenantTables())
  })

  it('enables and forces row-level security on every tenant table', async () => {
    const rows = await db.asSuperuser<{ relname: string }>(`select relname from pg_class where relnamespace = 'public'::regnamespace and relrowsecurity and relforcerowsecurity order by relname`)
    expect(rows.map(row => row.relname)).toEqual(tenantTables())
  })

  it('gives every tenant table the one policy that binds reading and writing to the open brewery', async () => {
    const rows = await db.asSuperuser<{ tablename: string, qual: string, with_check: string }>(`select tablename, qual, with_check from pg_policies where policyname = 'brewery_rows' and cmd = 'ALL' and permissive = 'PERMISSIVE' order by tablename`)
    expect(rows.map(row => row.tablename)).toEqual(tenantTables())
    const open = `(brewery_id = (NULLIF(current_setting('undercroft.brewery'::text, true), ''::text))::uuid)`
    for (const row of rows) expect([row.qual, row.with_check]).toEqual([open, open])
  })

  it('has no other policy than a person’s view of their own memberships', async () => {
    const rows = await db.asSuperuser(`select tablename, policyname, cmd from pg_policies where policyname <> 'brewery_rows'`)
    expect(rows).toEqual([{ tablename: 'memberships', policyname: 'own_memberships', cmd: 'SELECT' }])
  })

  it('puts brewery_id first in every primary and unique key of a tenant table', async () => {
    const rows = await db.asSuperuser<{ table: string, index: string, first: string }>(`
      select c.relname as table, i.relname as index, a.attname as first
      from pg_index x join pg_class c on c.oid = x.indrelid join pg_class i on i.oid = x.indexrelid
      join pg_attribute a on a.attrelid = c.oid and a.attnum = x.indkey[0]
      where c.relnamespace = 'public'::regnamespace and x.indisunique`)
    const ofTenants = rows.filter(row => tenantTables().includes(row.table))
    expect(ofTenants.length).toBeGreaterThanOrEqual(tenantTables().length)
    expect(ofTenants.filter(row => row.first !== 'brewery_id')).toEqual([])
  })

  it('lets no foreign key between tenant tables leave brewery_id out', async () => {
    const rows = await db.asSuperuser<{ name: string, from: string, to: string, columns: string[] }>(`
      select k.conname as name, f.relname as from, t.relname as to,
        array(select a.attname::text from unnest(k.conkey) with ordinality n(num, ord) join pg_attribute a on a.attrelid = k.conrelid and a.attnum = n.num order by n.ord) as columns
      from pg_constraint k join pg_class f on f.oid = k.conrelid join pg_class t on t.oid = k.confrelid
      where k.contype = 'f' and k.connamespace = 'public'::regnamespace`)
    const between = rows.filter(row => tenantTables().includes(row.to))
    expect(between.map(row => row.name)).toContain('vessels_beer_fkey')
    expect(between.filter(row => row.columns[0] !== 'brewery_id')).toEqual([])
  })

  it('connects the application as a role that owns nothing and passes no policy by', async () => {
    const [role] = await db.asSuperuser(`select rolsuper, rolbypassrls, rolcreatedb, rolcreaterole, rolreplication from pg_roles where rolname = 'undercroft_app'`)
    expect(role).toEqual({ rolsuper: false, rolbypassrls: false, rolcreatedb: false, rolcreaterole: false, rolreplication: false })
    const owned = await db.asSuperuser(`select relname from pg_class where pg_get_userbyid(relowner) = 'undercroft_app'`)
    const member = await db.asSuperuser(`select 1 from pg_auth_members where pg_get_userbyid(member) = 'undercroft_app'`)
    expect([owned, member]).toEqual([[], []])
  })

  it('runs no function with its owner’s rights and has no view', async () => {
    const definers = await db.asSuperuser(`select proname from pg_proc where pronamespace = 'public'::regnamespace and prosecdef`)
    const views = await db.asSuperuser(`select relname from pg_class where relnamespace = 'public'::regnamespace and relkind in ('v', 'm')`)
    expect([definers, views]).toEqual([[], []])
  })

  it.each(APPEND_ONLY)('refuses to change, delete or empty %s, to the application and to the owner', async (table) => {
    const grants = await db.asSuperuser<{ privilege_type: string }>(`select privilege_type from information_schema.role_table_grants where grantee = 'undercroft_app' and table_name = $1 order by 1`, [table])
    expect(grants.map(row => row.privilege_type)).toEqual(['INSERT', 'SELECT'])
    for (const statement of [`update ${table} set id = id`, `delete from ${table}`, `truncate ${table} cascade`]) {
      await expect(db.asSuperuser(statement), statement).rejects.toMatchObject({ code: '42501' })
    }
  })
})
