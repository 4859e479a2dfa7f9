import { chownSync, mkdirSync, renameSync, rmSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { Failure } from '../failure'
import { run } from '../run'
import { switchTo, type Account } from './account'

/**
 * Make a cluster. It gets its name only once it is complete, so a folder of that name is never a half-made one,
 * and what an interrupted start left is thrown away and made anew.
 */
export async function makeCluster(options: { cluster: string, binaries: string, account: Account, superuserPassword: string, fast: boolean }): Promise<void> {
  const draft = `${options.cluster}.new`
  const passwordFile = `${options.cluster}.password`
  const as = switchTo(options.account)
  rmSync(draft, { recursive: true, force: true })
  mkdirSync(draft, { mode: 0o700 })
  try {
    writeFileSync(passwordFile, options.superuserPassword, { mode: 0o600 })
    if (as) for (const path of [draft, passwordFile]) chownSync(path, as.uid, as.gid)
    const made = await run([
      join(options.binaries, 'initdb'), '--pgdata', draft, '--username=postgres', `--pwfile=${passwordFile}`,
      '--auth=scram-sha-256', '--encoding=UTF8', '--locale=C.UTF-8', '--data-checksums', ...(options.fast ? ['--no-sync'] : []),
    ], { as, cwd: '/' })
    if (made.code !== 0) throw new Failure(`PostgreSQL could not make its database in ${draft}:\n${made.output}`)
  }
  finally {
    rmSync(passwordFile, { force: true })
  }
  renameSync(draft, options.cluster)
}
