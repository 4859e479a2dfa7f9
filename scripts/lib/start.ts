import { once } from 'node:events'
import type { Settings } from '../../server/utils/settings'
import { announcement } from './announce'
import { settingsFromEnvironment } from './environment'
import { explain, Failure } from './failure'
import { openDatabase } from './open'
import { isPortFree, writePorts } from './ports'
import { DATABASE, startCluster } from './postgres'
import { readRun, removeRun, tellNextStart, writeRun } from './runFile'
import { keepSecrets } from './secrets'
import { becomesHealthy, endServer, launchServer } from './server'

/** What was started, to be stopped in the other order. */
type Undo = (() => Promise<void>)[]

/**
 * Start everything and stay until asked to stop (`signal`) or until a part of it ends by itself, which is a failure.
 * Run by scripts/start, which holds the data folder's lock and has prepared all that is not ours to run.
 */
async function start(settings: Settings, dev: boolean, signal: AbortSignal, undo: Undo): Promise<void> {
  const { dataFolder, host, port, origin } = settings
  await endServerOfKilledStart(dataFolder)
  if (!await isPortFree(port, host)) {
    throw new Failure(`Port ${port} on ${host} is taken by another program. Choose another, for example: PORT=3001 scripts/start`)
  }

  const database = await provideDatabase(settings, signal, undo)
  const now = settings.startsAt === undefined ? new Date() : new Date(settings.startsAt)
  const clockAhead = now.getTime() - Date.now()
  const opening = await openDatabase({ ...database, demo: settings.demo, now, signal })
  signal.throwIfAborted()

  const server = launchServer({ dev, dataFolder, environment: environmentOfServer(settings, database.databaseUrl, dev) })
  undo.push(server.stop)
  writeRun(dataFolder, { server: server.mark, clockAhead })
  await becomesHealthy(server, `http://${connectable(host)}:${port}`, dev ? 180 : 30, signal)
  tellNextStart(dataFolder, 'running', origin)
  console.log(announcement(origin, opening))

  await Promise.race([
    once(signal, 'abort'),
    fallen('The server', server.exited, 'server.log'),
    ...(database.exited ? [fallen('PostgreSQL', database.exited, 'postgres.log')] : []),
  ])

  async function fallen(part: string, exited: Promise<string>, log: string): Promise<void> {
    const how = await exited
    throw new Failure(`${part} stopped by itself (${how}); its log is ${dataFolder}/logs/${log}. All else is stopped too: scripts/start serves again.`)
  }
}

/** Our own PostgreSQL, unless DATABASE_URL names another. */
async function provideDatabase(settings: Settings, signal: AbortSignal, undo: Undo): Promise<{ databaseUrl: string, ownerUrl: string | undefined, exited?: Promise<string> }> {
  const { dataFolder, port } = settings
  if (settings.databaseUrl !== undefined) {
    writePorts(dataFolder, { web: port })
    return { databaseUrl: settings.databaseUrl, ownerUrl: settings.databaseOwnerUrl }
  }
  const cluster = await startCluster({ dataFolder, signal })
  undo.push(cluster.stop)
  writePorts(dataFolder, { postgres: cluster.port, web: port })
  return { databaseUrl: cluster.urls.app(DATABASE), ownerUrl: cluster.urls.owner(DATABASE), exited: cluster.exited }
}

/** A killed start's server ends by itself within moments; one that hangs is ended here, before its port is looked at. */
async function endServerOfKilledStart(dataFolder: string): Promise<void> {
  const run = readRun(dataFolder)
  if (!run) return
  await endServer(run.server, 3)
  removeRun(dataFolder)
}

/** The server gets the application's role alone, never the owner's. */
function environmentOfServer(settings: Settings, databaseUrl: string, dev: boolean): Record<string, string | undefined> {
  return {
    ...process.env,
    NODE_ENV: dev ? 'development' : 'production',
    HOST: settings.host,
    PORT: String(settings.port),
    NITRO_HOST: settings.host,
    NITRO_PORT: String(settings.port),
    UNDERCROFT_DATA: settings.dataFolder,
    UNDERCROFT_DEMO: settings.demo,
    DATABASE_URL: databaseUrl,
    DATABASE_OWNER_URL: undefined,
    NUXT_SESSION_PASSWORD: settings.sessionPassword ?? keepSecrets(settings.dataFolder).sessionPassword,
  }
}

/** Where a server that listens on all addresses is reached from here. */
function connectable(host: string): string {
  if (host === '0.0.0.0') return '127.0.0.1'
  if (host === '::') return '[::1]'
  return host.includes(':') ? `[${host}]` : host
}

const stop = new AbortController()
// A second Ctrl-C changes nothing: what is being stopped goes on being stopped.
for (const name of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) {
  process.on(name, () => {
    if (!stop.signal.aborted) console.log('\nStopping …')
    stop.abort()
  })
}

// Whoever read our output may be gone; that is no reason to fall over and leave everything running.
for (const stream of [process.stdout, process.stderr]) stream.on('error', () => undefined)

const undo: Undo = []
let settings: Settings | undefined
try {
  settings = settingsFromEnvironment()
  await start(settings, process.argv.includes('--dev'), stop.signal, undo)
}
catch (error) {
  if (!stop.signal.aborted) {
    console.error(explain(error))
    process.exitCode = 1
  }
}
if (settings) tellNextStart(settings.dataFolder, 'stopping', settings.origin)
for (const step of undo.reverse()) await step()
if (settings) removeRun(settings.dataFolder)
process.exit()
