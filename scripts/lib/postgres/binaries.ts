import { existsSync, readdirSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import { Failure } from '../failure'

const DEBIAN_FOLDER = '/usr/lib/postgresql'
const OLDEST = 15

/** The folder of PostgreSQL's programs: the newest there is, for a cluster that exists the one of its own version. */
export function binariesFor(cluster: string | undefined, folder = DEBIAN_FOLDER): string {
  const versions = installedVersions(folder)
  const newest = versions[0]
  if (newest === undefined) throw new Failure(`PostgreSQL ${OLDEST} or newer is missing. Install it: apt-get install postgresql`)
  if (cluster === undefined) return join(folder, String(newest), 'bin')

  const version = Number(readFileSync(join(cluster, 'PG_VERSION'), 'utf8'))
  if (versions.includes(version)) return join(folder, String(version), 'bin')
  throw new Failure(`The database in ${cluster} was made by PostgreSQL ${version}, which is not installed; ${newest} is, and can't read it. `
    + `Install it (apt-get install postgresql-${version}), or move the database over with pg_upgrade.`)
}

function installedVersions(folder: string): number[] {
  if (!existsSync(folder)) return []
  return readdirSync(folder)
    .filter(name => ['postgres', 'initdb'].every(program => existsSync(join(folder, name, 'bin', program))))
    .map(Number)
    .filter(version => version >= OLDEST)
    .sort((a, b) => b - a)
}
