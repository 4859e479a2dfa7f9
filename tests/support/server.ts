import { spawn } from 'node:child_process'
import { once } from 'node:events'
import { createServer, type AddressInfo } from 'node:net'
import { fileURLToPath } from 'node:url'
import { freshSetUpCode } from '../../server/commands/freshSetUpCode'
import { DEMO_MORNING } from './cluster'
import { freshDatabase, type TestDatabase } from './database'

const BUILT = fileURLToPath(new URL('../../.output/server/index.mjs', import.meta.url))
export const SESSION_PASSWORD = 'a password for tests, of forty signs or so'

export interface TestServer {
  origin: string
  port: number
  db: TestDatabase
  /** The one-time code of an empty installation. */
  setUpCode: string | undefined
  /** All that the server has printed so far. */
  printed(): string
  stop(): Promise<void>
}

/** The built server on a database and a port of its own. Without `demo` the installation is empty. */
export async function startServer({ demo = true, now = DEMO_MORNING, db, env = {} }: { demo?: boolean, now?: string, db?: TestDatabase, env?: Record<string, string> } = {}): Promise<TestServer> {
  const own = db ?? await freshDatabase({ demo })
  const code = demo ? null : await freshSetUpCode({ databaseUrl: own.urls.app, now: new Date(now) })
  const port = await freePort()
  const origin = `http://localhost:${port}`
  const child = spawn(process.execPath, [BUILT], {
    env: {
      PATH: process.env.PATH,
      NODE_ENV: 'production',
      HOST: '127.0.0.1',
      PORT: String(port),
      UNDERCROFT_NOW: now,
      DATABASE_URL: own.urls.app,
      NUXT_SESSION_PASSWORD: SESSION_PASSWORD,
      ...env,
    },
    stdio: ['ignore', 'pipe', 'pipe'],
  })
  let output = ''
  const keep = (text: string) => {
    output += text
  }
  for (const stream of [child.stdout, child.stderr]) stream.setEncoding('utf8').on('data', keep)
  const exited = once(child, 'exit')
  await Promise.race([
    answers(`http://127.0.0.1:${port}/api/health`),
    exited.then(() => Promise.reject(new Error(`the server ended at once:\n${output}`))),
  ])
  return {
    origin,
    port,
    db: own,
    setUpCode: code?.code,
    printed: () => output,
    stop: async () => {
      child.kill('SIGKILL')
      await exited
      if (!db) await own.drop()
    },
  }
}

export async function freePort(): Promise<number> {
  const server = createServer().listen(0, '127.0.0.1')
  await once(server, 'listening')
  const { port } = server.address() as AddressInfo
  server.close()
  await once(server, 'close')
  return port
}

async function answers(url: string): Promise<void> {
  for (let tries = 0; tries < 200; tries++) {
    const status = await fetch(url).then(response => response.status, () => 0)
    if (status !== 0) return
    await new Promise(resolve => setTimeout(resolve, 50))
  }
  throw new Error(`nothing answers at ${url}`)
}
