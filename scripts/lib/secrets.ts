import { randomBytes } from 'node:crypto'
import { existsSync } from 'node:fs'
import { join } from 'node:path'
import { z } from 'zod'
import { Failure } from './failure'
import { readIfThere, writeWhole } from './files'

const Secrets = z.object({
  sessionPassword: z.string().min(32),
  postgres: z.object({ superuser: z.string(), owner: z.string(), app: z.string(), backup: z.string() }),
})
export type Secrets = z.output<typeof Secrets>

/** The passwords of a data folder, undefined before its first start. */
export function readSecrets(dataFolder: string): Secrets | undefined {
  const text = readIfThere(secretsFile(dataFolder))
  if (text === undefined) return undefined
  try {
    return Secrets.parse(JSON.parse(text))
  }
  catch {
    throw new Failure(`${secretsFile(dataFolder)} can't be read as the passwords of this data folder. Put it back from a backup.`)
  }
}

/** The passwords of a data folder, made if this is its first start. Only whoever owns the folder can read them. */
export function keepSecrets(dataFolder: string): Secrets {
  const kept = readSecrets(dataFolder)
  if (kept) return kept
  const made: Secrets = {
    sessionPassword: password(),
    postgres: { superuser: password(), owner: password(), app: password(), backup: password() },
  }
  writeWhole(secretsFile(dataFolder), `${JSON.stringify(made, null, 2)}\n`, 0o600)
  return made
}

export function hasSecrets(dataFolder: string): boolean {
  return existsSync(secretsFile(dataFolder))
}

function secretsFile(dataFolder: string): string {
  return join(dataFolder, 'secrets.json')
}

function password(): string {
  return randomBytes(32).toString('base64url')
}
