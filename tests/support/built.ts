import { spawn } from 'node:child_process'
import { once } from 'node:events'
import { fileURLToPath } from 'node:url'
import { answers, freePort } from './ports'

const BUILT = fileURLToPath(new URL('../../.output/server/index.mjs', import.meta.url))
export const SESSION_PASSWORD = 'a password for tests, of forty signs or so'

export interface BuiltServer {
  origin: string
  port: number
  /** All that the server has printed so far. */
  printed(): string
  stop(): Promise<void>
}

/** The built server, on a port of its own. It is given no environment but this. */
export async function runBuilt({ databaseUrl, now, env = {} }: { databaseUrl: string, now: string, env?: Record<string, string> }): Promise<BuiltServer> {
  const port = await freePort()
  const child = spawn(process.execPath, [BUILT], {
    env: {
      PATH: process.env.PATH,
      NODE_ENV: 'production',
      HOST: '127.0.0.1',
      PORT: String(port),
      UNDERCROFT_NOW: now,
      DATABASE_URL: databaseUrl,
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
    origin: `http://localhost:${port}`,
    port,
    printed: () => output,
    stop: async () => {
      child.kill('SIGKILL')
      await exited
    },
  }
}
