import { createHash, randomBytes } from 'node:crypto'
import { chmodSync, chownSync, existsSync, mkdirSync, statSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { z } from 'zod'
import { Failure } from '../failure'
import { readIfThere, writeWhole } from '../files'
import { canEnter, type Account } from './account'

const Elsewhere = z.object({ folder: z.string() })

/** The folder of the cluster that a data folder has, undefined before it has one. */
export function existingCluster(dataFolder: string): string | undefined {
  const within = join(dataFolder, 'postgres')
  if (existsSync(within)) return within
  const note = readIfThere(noteFile(dataFolder))
  if (note === undefined) return undefined
  const { folder } = Elsewhere.parse(JSON.parse(note))
  if (existsSync(folder)) return folder
  throw new Failure(`${noteFile(dataFolder)} says that the database is in ${folder}, but it is not there. Put it back from a backup, or take that file away to begin with an empty database.`)
}

/** Where a new cluster goes: into the data folder or, where PostgreSQL's user can't get there, to a place of its own. */
export async function placeForCluster(dataFolder: string, account: Account, fast: boolean): Promise<string> {
  await letPass(dataFolder, account)
  if (await canEnter(account, dataFolder)) return join(dataFolder, 'postgres')
  const shelter = fast ? '/var/tmp' : '/var/lib/undercroft'
  // Passable, so that PostgreSQL gets to its own folder in there; that one is closed to everybody else.
  if (!fast) mkdirSync(shelter, { recursive: true, mode: 0o711 })
  // The random part keeps a data folder that was thrown away and made anew from meeting the old one's database.
  return join(shelter, `undercroft-${hash(dataFolder)}-${randomBytes(4).toString('hex')}`)
}

/** A data folder that was moved may lie where PostgreSQL's user can't get any more. */
export async function requireEntry(dataFolder: string, cluster: string, account: Account): Promise<void> {
  if (dirname(cluster) === dataFolder) await letPass(dataFolder, account)
  if (await canEnter(account, cluster)) return
  throw new Failure(`PostgreSQL's user can't enter ${cluster}: let it pass through the folders above (chmod o+x), or move the data folder elsewhere.`)
}

/** Once a cluster outside the data folder is complete, the data folder remembers it. */
export function rememberPlace(dataFolder: string, cluster: string): void {
  if (dirname(cluster) === dataFolder) return
  writeWhole(noteFile(dataFolder), `${JSON.stringify({ folder: cluster })}\n`, 0o600)
}

/** A data folder that is root's alone lets PostgreSQL's user pass through, without reading: the group is free to be used for that. */
async function letPass(dataFolder: string, account: Account): Promise<void> {
  const { uid, mode } = statSync(dataFolder)
  const isOursAlone = uid === 0 && process.getuid?.() === 0 && (mode & 0o077) === 0
  if (!isOursAlone || !await canEnter(account, dirname(dataFolder))) return
  chownSync(dataFolder, 0, account.gid)
  chmodSync(dataFolder, 0o710)
}

function noteFile(dataFolder: string): string {
  return join(dataFolder, 'cluster.json')
}

function hash(path: string): string {
  return createHash('sha256').update(path).digest('hex').slice(0, 12)
}
