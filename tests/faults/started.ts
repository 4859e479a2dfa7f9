import { spawn } from 'node:child_process'
import { mkdtempSync, readFileSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join, resolve } from 'node:path'
import { existingCluster } from '../../scripts/lib/postgres/place'
import { freePort } from '../../scripts/lib/ports'
import { markOf, type ProcessMark } from '../../scripts/lib/processes'
import { readRun } from '../../scripts/lib/runFile'
import { DEMO_PASSWORD } from '../../dev/loadDemo'

/** A real `scripts/start`, with everything it has written so far. */
export interface Started {
  mark: ProcessMark
  output(): string
  /** Resolves once it says that it runs; rejects with what it said if it ends first. */
  running: Promise<void>
  /** Resolves with the exit code, or with the signal that killed it. */
  ended: Promise<number | string>
}

export interface Place {
  dataFolder: string
  port: number
}

export async function newPlace(within = tmpdir()): Promise<Place> {
  return { dataFolder: mkdtempSync(join(within, 'undercroft-start-')), port: await freePort() }
}

/** Take a place away again, with the cluster that it may have elsewhere. */
export function clearPlace({ dataFolder }: Place): void {
  const cluster = existingCluster(dataFolder)
  if (cluster !== undefined) rmSync(cluster, { recursive: true, force: true })
  rmSync(dataFolder, { recursive: true, force: true })
}

/** Start it with nothing in the environment but what is given, so that the test run's own settings don't reach it. */
export function begin(place: Place, environment: Record<string, string> = {}): Started {
  const { PATH, HOME } = process.env
  const child = spawn(resolve('scripts/start'), {
    env: { PATH, HOME, PORT: String(place.port), UNDERCROFT_DATA: place.dataFolder, ...environment },
    stdio: ['ignore', 'pipe', 'pipe'],
  })
  const mark = child.pid === undefined ? undefined : markOf(child.pid)
  if (!mark) throw new Error('scripts/start could not be run')
  let output = ''
  const ended = new Promise<number | string>((done) => {
    child.on('close', (code, signal) => done(signal ?? code ?? 'ended'))
  })
  const running = new Promise<void>((done, fail) => {
    for (const stream of [child.stdout, child.stderr]) {
      stream.on('data', (chunk: Buffer) => {
        output += chunk.toString()
        if (output.includes('Ctrl-C stops it.')) done()
      })
    }
    void ended.then(() => fail(new Error(`scripts/start ended before it served:\n${output}`)))
  })
  // A start that is meant to be refused never runs, and nobody waits for it to.
  running.catch(() => undefined)
  return { mark, output: () => output, running, ended }
}

export async function stop(started: Started): Promise<void> {
  process.kill(started.mark.pid, 'SIGTERM')
  await started.ended
}

export function serverOf(place: Place): ProcessMark {
  const run = readRun(place.dataFolder)
  if (!run) throw new Error('nothing runs there')
  return run.server
}

export function postgresOf(place: Place): ProcessMark {
  const pidFile = join(existingCluster(place.dataFolder) ?? '', 'postmaster.pid')
  const mark = markOf(Number(readFileSync(pidFile, 'utf8').split('\n')[0]))
  if (!mark) throw new Error('no PostgreSQL runs there')
  return mark
}

/** How a person gets on: the health page, then the first sign-in that the start printed. */
export async function signIn(place: Place, output: string): Promise<number> {
  const origin = `http://localhost:${place.port}`
  const email = /^ {2}(\S+@\S+)/m.exec(output)?.[1]
  const answer = await fetch(`http://127.0.0.1:${place.port}/api/auth/sign-in`, {
    method: 'POST',
    headers: { 'content-type': 'application/json', origin },
    body: JSON.stringify({ email, password: DEMO_PASSWORD }),
  })
  await answer.body?.cancel()
  return answer.status
}
