import { createHash, createHmac, randomBytes, randomInt } from 'node:crypto'

/** A new secret of 256 bits, for a cookie. */
export function newToken(): string {
  return randomBytes(32).toString('base64url')
}

/** What is kept of a random secret. Such a secret has no need of a slow hash. */
export function hashToken(token: string): string {
  return createHash('sha256').update(token).digest('hex')
}

/** A mark of something personal that can be counted but not read back. */
export function keyedHash(key: string, value: string): string {
  return createHmac('sha256', key).update(value).digest('hex')
}

// Without 0 and O, 1, I and L: they are read from a terminal and typed on a tablet.
const SIGNS = '23456789ABCDEFGHJKMNPQRSTUVWXYZ'
export const CODE_SIGNS = 12

/** A one-time code of twelve signs in groups of four, good for 59 bits. */
export function newCode(): string {
  const signs = Array.from({ length: CODE_SIGNS }, () => SIGNS[randomInt(SIGNS.length)]).join('')
  return signs.match(/.{4}/g)?.join(' ') ?? signs
}

/** A code as it was meant, however it was typed. */
export function tidyCode(typed: string): string {
  return typed.toUpperCase().replace(/[^0-9A-Z]/g, '')
}
