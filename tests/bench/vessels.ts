import { spawn } from 'node:child_process'
import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'
import pg from 'pg'
import { answers, freePort } from '../support/ports'
import { ratioOf, type Ratio } from './ratio'
import { CELLAR_SQL } from './sql'

const FLOOR = fileURLToPath(new URL('./floor', import.meta.url))

/** `GET /api/vessels` of a signed-in owner, with session, role, policies and transaction, against a bare handler with the same SQL. */
export async function benchVessels(server: { origin: string, cookie: string }, superuserUrl: string): Promise<Ratio> {
  const output = mkdtempSync(join(tmpdir(), 'undercroft-bench-'))
  const port = await freePort()
  const environment = { ...process.env, BENCH_FLOOR_OUTPUT: output, BENCH_DATABASE_URL: superuserUrl, BENCH_SQL: JSON.stringify(CELLAR_SQL), BENCH_BREWERY: await firstBrewery(superuserUrl), NODE_ENV: 'production', PORT: String(port), HOST: '127.0.0.1' }
  await run('npx', ['nitropack', 'build', '--dir', FLOOR], environment)
  const floor = spawn(process.execPath, [join(output, 'server/index.mjs')], { env: environment, stdio: 'ignore' })
  try {
    await answers(`http://127.0.0.1:${port}/vessels`)
    return await ratioOf(
      { url: `${server.origin}/api/vessels`, headers: { cookie: server.cookie } },
      { url: `http://127.0.0.1:${port}/vessels` },
    )
  }
  finally {
    floor.kill('SIGKILL')
    rmSync(output, { recursive: true, force: true })
  }
}

async function firstBrewery(url: string): Promise<string> {
  const client = new pg.Client({ connectionString: url })
  await client.connect()
  try {
    const { rows: [row] } = await client.query<{ id: string }>(`select id from breweries where name = 'Sallowmere Brewing'`)
    return row?.id ?? ''
  }
  finally {
    await client.end()
  }
}

function run(command: string, args: string[], env: NodeJS.ProcessEnv): Promise<void> {
  return new Promise((resolve, reject) => {
    const child = spawn(command, args, { env, stdio: ['ignore', 'ignore', 'inherit'] })
    child.on('exit', code => code === 0 ? resolve() : reject(new Error(`${command} ${args.join(' ')} ended with ${code}`)))
  })
}
