import pg from 'pg'
import { expect, inject, it } from 'vitest'
import { migrateDatabase } from '../../server/database/migrate'
import { onDatabase } from '../support/addresses'

it('migrates once, however many start at the same time', async () => {
  const cluster = inject('cluster')
  const superuser = new pg.Client({ connectionString: cluster.superuser })
  await superuser.connect()
  try {
    await superuser.query('create database test_migrate owner undercroft_owner')
    const owner = onDatabase(cluster.owner, 'test_migrate')
    await Promise.all(Array.from({ length: 4 }, () => migrateDatabase(owner)))
    await migrateDatabase(owner)
    const inside = new pg.Client({ connectionString: owner })
    await inside.connect()
    const { rows } = await inside.query('select count(*)::int as applied, count(distinct hash)::int as files from drizzle.__drizzle_migrations')
    await inside.end()
    expect(rows).toEqual([{ applied: rows[0].files, files: expect.any(Number) }])
    expect(rows[0].files).toBeGreaterThanOrEqual(2)
  }
  finally {
    await superuser.query('drop database if exists test_migrate with (force)')
    await superuser.end()
  }
})
