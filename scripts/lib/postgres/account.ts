import { statSync } from 'node:fs'
import { Failure } from '../failure'
import { run } from '../run'

/** The user that PostgreSQL's programs run as. */
export interface Account {
  uid: number
  gid: number
}

/**
 * PostgreSQL refuses to run as root: then it runs as `postgres`, who comes with its package. Anyone else runs it as themselves.
 * A cluster that is there already is run by whoever owns it.
 */
export async function databaseAccount(cluster: string | undefined): Promise<Account> {
  const own = { uid: process.getuid?.() ?? 0, gid: process.getgid?.() ?? 0 }
  if (cluster !== undefined) {
    const { uid, gid } = statSync(cluster)
    if (own.uid !== 0 && uid !== own.uid) throw new Failure(`The database in ${cluster} belongs to another user: start as that user, or as root.`)
    return { uid, gid }
  }
  if (own.uid !== 0) return own
  const ids = await Promise.all([run(['id', '-u', 'postgres']), run(['id', '-g', 'postgres'])])
  if (ids.some(id => id.code !== 0)) throw new Failure('There is no user named postgres, as whom PostgreSQL could run. Debian\'s package postgresql brings it.')
  const [uid, gid] = ids.map(id => Number(id.output))
  if (uid === undefined || gid === undefined) throw new Error('two ids asked for, fewer given')
  return { uid, gid }
}

/** What to give `run` and `spawn`: nothing where we are that user already, since only root may change. */
export function switchTo(account: Account): Account | undefined {
  return process.getuid?.() === 0 ? account : undefined
}

/** Whether that user can enter a folder: it takes the right to pass through every folder above it. */
export async function canEnter(account: Account, folder: string): Promise<boolean> {
  const test = await run(['test', '-x', folder], { as: switchTo(account), cwd: '/' })
  return test.code === 0
}
