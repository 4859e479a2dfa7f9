import { spawn } from 'node:child_process'
import { closeSync } from 'node:fs'
import { join, resolve } from 'node:path'
import { setTimeout as sleep } from 'node:timers/promises'
import { Failure } from './failure'
import { openLog } from './files'
import { endProcess, markOf, type ProcessMark } from './processes'
import { keepLog } from './serverLog'

export interface Server {
  mark: ProcessMark
  stop(): Promise<void>
  /** Resolves with how it ended, asked or not. */
  exited: Promise<string>
}

/** Start the server that was built, or Nuxt's own for developing. */
export function launchServer(options: { dev: boolean, dataFolder: string, environment: Record<string, string | undefined> }): Server {
  const log = openLog(join(options.dataFolder, 'logs', 'server.log'))
  const built = [resolve('.output/server/index.mjs')]
  const sources = [resolve('node_modules/nuxt/bin/nuxt.mjs'), 'dev', '--no-fork']
  // Should we be killed, the kernel ends the server at once: PostgreSQL ends beside it, so a gentler way would only hang.
  // Its own session keeps the terminal's Ctrl-C away: we stop things in order.
  const child = spawn('/usr/bin/setpriv', ['--pdeathsig', 'KILL', '--', process.execPath, ...(options.dev ? sources : built)], {
    env: options.environment, detached: true, stdio: ['ignore', 'pipe', 'pipe', 'ipc'],
  })
  const exited = new Promise<string>((done) => {
    child.on('close', (code, signal) => {
      closeSync(log)
      done(signal ?? `exit code ${code}`)
    })
  })
  for (const stream of [child.stdout, child.stderr]) if (stream) keepLog(stream, log)
  const mark = child.pid === undefined ? undefined : markOf(child.pid)
  if (!mark) throw new Failure('The server could not be started.')
  return { mark, exited, stop: () => endServer(mark, 10) }
}

/** Ask a server to end, and end it where it has not after so many seconds. */
export async function endServer(mark: ProcessMark, seconds: number): Promise<void> {
  await endProcess(mark, { ask: 'SIGTERM', patience: seconds * 1000, insist: 'SIGKILL', group: true })
}

/** Wait until the server says that it is well. */
export async function becomesHealthy(server: Server, address: string, seconds: number, signal: AbortSignal): Promise<void> {
  const giveUp = Date.now() + seconds * 1000
  let ended: string | undefined
  void server.exited.then(how => ended = how)
  while (!await isHealthy(address)) {
    signal.throwIfAborted()
    if (ended !== undefined) throw new Failure(`The server ended before it served (${ended}).`)
    if (Date.now() > giveUp) throw new Failure(`The server did not say within ${seconds} seconds that it is well.`)
    await sleep(100, undefined, { signal })
  }
}

async function isHealthy(address: string): Promise<boolean> {
  try {
    const answer = await fetch(`${address}/api/health`, { signal: AbortSignal.timeout(5000) })
    await answer.body?.cancel()
    return answer.status === 200
  }
  catch {
    return false
  }
}
