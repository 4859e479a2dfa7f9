import { spawn, type ChildProcess } from 'node:child_process'
import { closeSync, fstatSync, readFileSync, readlinkSync, realpathSync, rmSync } from 'node:fs'
import { join } from 'node:path'
import { setTimeout as sleep } from 'node:timers/promises'
import { Failure } from '../failure'
import { openLog, readIfThere } from '../files'
import { freePort } from '../ports'
import { endProcess, isAlive, markOf } from '../processes'
import { switchTo, type Account } from './account'

export interface Postmaster {
  port: number
  child: ChildProcess
  exited: Promise<string>
}

interface Options {
  cluster: string
  binaries: string
  account: Account
  log: string
  fast: boolean
  signal: AbortSignal | undefined
  /** Resolves true once the server lets the superuser in on that port, false while it is not up yet. */
  isReady: (port: number) => Promise<boolean>
}

const UP_AGAIN_IN_A_MOMENT = /shared memory block .* still in use|lock file .* already exists|could not bind|could not create any TCP\/IP sockets/
const RETRY_FOR = 20_000
/** After a crash PostgreSQL first replays what it had promised to keep; that may take its time. */
const READY_WITHIN = 120_000

/** Run the database server on a free port and wait until it lets us in. What an earlier, killed start left is ended first. */
export async function runPostmaster(options: Options): Promise<Postmaster> {
  await endLeftOver(options.cluster)
  const giveUp = Date.now() + RETRY_FOR
  for (;;) {
    const log = openLog(options.log)
    const logged = fstatSync(log).size
    const postmaster = launch(options, await freePort(), log)
    closeSync(log)
    if (await becomesReady(postmaster, options)) return postmaster
    const why = readFileSync(options.log).subarray(logged).toString()
    if (!UP_AGAIN_IN_A_MOMENT.test(why) || Date.now() > giveUp) throw new Failure(`PostgreSQL does not start:\n${why}`)
    await sleep(500, undefined, { signal: options.signal })
  }
}

/** A fast shutdown; should it hang, an immediate one, which loses nothing that was committed. */
export async function stopPostmaster(child: ChildProcess): Promise<void> {
  const mark = child.pid === undefined ? undefined : markOf(child.pid)
  if (mark) await endProcess(mark, { ask: 'SIGINT', patience: 20_000, insist: 'SIGQUIT' })
}

function launch(options: Options, port: number, log: number): Postmaster {
  const settings = {
    listen_addresses: '127.0.0.1',
    unix_socket_directories: '',
    port,
    timezone: 'UTC',
    log_timezone: 'UTC',
    max_connections: options.fast ? 200 : 100,
    // Statements and details quote the values in them: people's addresses, and passwords when roles are made.
    log_error_verbosity: 'terse',
    log_min_error_statement: 'panic',
    ...(options.fast && { fsync: 'off', synchronous_commit: 'off', full_page_writes: 'off' }),
  }
  const as = switchTo(options.account)
  // The kernel asks PostgreSQL to shut down when we are killed. Its own session keeps the terminal's Ctrl-C away: the server goes first.
  const child = spawn('/usr/bin/setpriv', [
    '--pdeathsig', 'INT', ...(as ? ['--reuid', String(as.uid), '--regid', String(as.gid), '--clear-groups'] : []), '--',
    join(options.binaries, 'postgres'), '-D', options.cluster, ...Object.entries(settings).flatMap(([name, value]) => ['-c', `${name}=${value}`]),
  ], { cwd: '/', detached: true, stdio: ['ignore', log, log], env: { LANG: 'C.UTF-8' } })
  const exited = new Promise<string>((resolve) => {
    child.on('exit', (code, signal) => resolve(signal ?? `exit code ${code}`))
    child.on('error', error => resolve(error.message))
  })
  return { port, child, exited }
}

async function becomesReady(postmaster: Postmaster, options: Options): Promise<boolean> {
  let ended = false
  void postmaster.exited.then(() => ended = true)
  const giveUp = Date.now() + READY_WITHIN
  try {
    while (!ended && Date.now() < giveUp) {
      if (await options.isReady(postmaster.port)) return true
      await sleep(50, undefined, { signal: options.signal })
    }
  }
  catch (error) {
    await stopPostmaster(postmaster.child)
    throw error
  }
  await stopPostmaster(postmaster.child)
  return false
}

/** The postmaster of a killed start may live on; it is shut down so that there is one alone. */
async function endLeftOver(cluster: string): Promise<void> {
  const pidFile = join(cluster, 'postmaster.pid')
  const mark = markOf(Number(readIfThere(pidFile)?.split('\n')[0]))
  if (!mark) return
  if (workingFolder(mark.pid) !== realpathSync(cluster)) {
    // The number is another process's now. PostgreSQL would believe that one to be its own and refuse to start.
    rmSync(pidFile)
    return
  }
  await endProcess(mark, { ask: 'SIGINT', patience: 20_000, insist: 'SIGQUIT' })
  if (isAlive(mark)) throw new Failure(`The PostgreSQL of an earlier start (process ${mark.pid}) does not stop.`)
}

function workingFolder(pid: number): string | undefined {
  try {
    return readlinkSync(`/proc/${pid}/cwd`)
  }
  catch {
    return undefined
  }
}
