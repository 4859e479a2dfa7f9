import { z } from 'zod'
import { freshSetUpCode } from '../../server/commands/freshSetUpCode'
import { settingsFromEnvironment } from './environment'
import { explain, Failure } from './failure'
import { readIfThere } from './files'
import { portsFile } from './ports'
import { DATABASE, urlsFor } from './postgres'
import { readRun } from './runFile'
import { readSecrets } from './secrets'

try {
  const settings = settingsFromEnvironment()
  const databaseUrl = settings.databaseUrl ?? urlOfRunning(settings.dataFolder)
  // The code's time is judged by the clock of the server that runs, which need not be the machine's.
  const clockAhead = readRun(settings.dataFolder)?.clockAhead ?? 0
  const fresh = await freshSetUpCode({ databaseUrl, now: new Date(Date.now() + clockAhead) })
  if (!fresh) throw new Failure('There is a brewery already, so there is nothing to set up: its owner invites people.')
  console.log(`${fresh.code}\nIt is good until ${fresh.until.toISOString()}.`)
}
catch (error) {
  console.error(explain(error))
  process.exitCode = 1
}

function urlOfRunning(dataFolder: string): string {
  const ports = readIfThere(portsFile(dataFolder))
  const secrets = readSecrets(dataFolder)
  if (ports === undefined || !secrets || !readRun(dataFolder)) {
    throw new Failure(`Undercroft does not run from ${dataFolder}: start it first, name its folder in UNDERCROFT_DATA, or give DATABASE_URL.`)
  }
  const { postgres } = z.object({ postgres: z.number() }).parse(JSON.parse(ports))
  return urlsFor(postgres, secrets.postgres).app(DATABASE)
}
