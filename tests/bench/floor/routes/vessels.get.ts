import { defineEventHandler } from 'h3'
import pg from 'pg'

const pool = new pg.Pool({ connectionString: process.env.BENCH_DATABASE_URL, max: 10 })

/** The same rows by the same SQL as `GET /api/vessels`, with no session, no role, no policy and no transaction. */
export default defineEventHandler(async () => {
  const { rows } = await pool.query({
    name: 'vessels_in_walking_order',
    text: process.env.BENCH_SQL ?? '',
    values: [process.env.BENCH_BREWERY],
  })
  return rows
})
