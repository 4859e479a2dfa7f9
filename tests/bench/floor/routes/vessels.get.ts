import { defineEventHandler } from 'h3'
import pg from 'pg'

const pool = new pg.Pool({ connectionString: process.env.BENCH_DATABASE_URL, max: 10, pipeline: true })
const statements: string[] = JSON.parse(process.env.BENCH_SQL ?? '[]')

/** The same rows by the same SQL as `GET /api/vessels`, with no session, no role, no policy, no transaction and no replay. */
export default defineEventHandler(async () => {
  const client = await pool.connect()
  try {
    const results = await Promise.all(statements.map((text, at) => client.query({ name: `floor_${at}`, text, values: [process.env.BENCH_BREWERY] })))
    return results.map(result => result.rows)
  }
  finally {
    client.release()
  }
})
