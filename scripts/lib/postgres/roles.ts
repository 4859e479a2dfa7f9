import type { Client } from 'pg'
import type { Secrets } from '../secrets'

export const OWNER = 'undercroft_owner'
export const APP = 'undercroft_app'
export const BACKUP = 'undercroft_backup'

/** The three roles beside the superuser. Only the owner may change the schema, and only a backup sees past row-level security. */
export async function ensureRoles(superuser: Client, passwords: Secrets['postgres']): Promise<void> {
  const roles = [
    { name: OWNER, password: passwords.owner, rights: 'NOBYPASSRLS' },
    { name: APP, password: passwords.app, rights: 'NOBYPASSRLS' },
    { name: BACKUP, password: passwords.backup, rights: 'BYPASSRLS' },
  ]
  const { rows } = await superuser.query<{ rolname: string }>('SELECT rolname FROM pg_roles')
  for (const { name, password, rights } of roles) {
    if (rows.some(row => row.rolname === name)) continue
    await superuser.query(`CREATE ROLE ${name} LOGIN NOSUPERUSER NOCREATEDB NOCREATEROLE ${rights} PASSWORD ${superuser.escapeLiteral(password)}`)
  }
  await superuser.query(`GRANT pg_read_all_data TO ${BACKUP}`)
}

export async function hasDatabase(superuser: Client, name: string): Promise<boolean> {
  const { rowCount } = await superuser.query('SELECT FROM pg_database WHERE datname = $1', [name])
  return rowCount === 1
}

/** A database of the owner's. */
export async function makeDatabase(superuser: Client, name: string, template = 'template0'): Promise<void> {
  await superuser.query(`CREATE DATABASE ${superuser.escapeIdentifier(name)} OWNER ${OWNER} TEMPLATE ${superuser.escapeIdentifier(template)}`)
}

/** The others may connect to it, and no more: PostgreSQL would let everybody in and make temporary tables. */
export async function limitDatabase(superuser: Client, name: string): Promise<void> {
  const database = superuser.escapeIdentifier(name)
  await superuser.query(`REVOKE ALL ON DATABASE ${database} FROM PUBLIC; GRANT CONNECT ON DATABASE ${database} TO ${APP}, ${BACKUP}`)
}
