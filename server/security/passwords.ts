import { Scrypt } from '@adonisjs/hash/drivers/scrypt'
import { dictionary } from '@zxcvbn-ts/language-common'
import pLimit from 'p-limit'
import { fieldFault, Fault } from '#shared/types/fault'

// OWASP's password storage advice: N 2^15, r 8, p 3. Each hash takes 32 MiB while it runs.
const scrypt = new Scrypt({ cost: 2 ** 15, blockSize: 8, parallelization: 3, saltSize: 16, keyLength: 64, maxMemory: 64 * 1024 * 1024 })

/** How many hashes run at once in this process, and how many may wait. Beyond that a sign-in is put off. */
const AT_ONCE = 2
const WAITING = 40
const line = pLimit(AT_ONCE)

const common = new Set(dictionary['passwords-common'])

// The same letters can be typed as different code points on another keyboard.
const normalised = (password: string) => password.normalize('NFKC')

/** Run work that hashes when its turn comes. Throws `tooMany` when the line is full already. */
export function inTurn<T>(work: () => Promise<T>): Promise<T> {
  if (line.pendingCount >= WAITING) {
    return Promise.reject(new Fault('tooMany', 'Many people are signing in at this moment. Try again in a few seconds.', { retryAfterSeconds: 5 }))
  }
  return line(work)
}

/** The hash of a new password, to be kept. Call it in turn. */
export function hashPassword(password: string): Promise<string> {
  return scrypt.make(normalised(password))
}

/** Whether `password` is the one behind `hash`. Call it in turn. */
export function verifyPassword(hash: string, password: string): Promise<boolean> {
  return scrypt.verify(hash, normalised(password))
}

/** Whether a hash was made with other costs than today's, so that it should be made anew at the next sign-in. */
export function needsNewHash(hash: string): boolean {
  return scrypt.needsReHash(hash)
}

let decoy: Promise<string> | undefined

/** A hash that no password opens: checked for addresses that nobody has, so that they take as long as the others. */
export function decoyHash(): Promise<string> {
  decoy ??= hashPassword(`nobody ${Math.random()} ${Math.random()}`)
  return decoy
}

/**
 * Refuse a password that is among the most used, also with figures or signs hung on its end, or that is the person's own
 * name or address. Length is the schema's.
 */
export function requireUncommon(password: string, own: readonly string[]): void {
  const plain = normalised(password).toLowerCase().trim()
  const stem = plain.replace(/[^\p{L}]+$/u, '')
  const alike = own.map(word => word.toLowerCase())
  if (common.has(plain) || common.has(stem) || new Set(plain).size < 4 || alike.includes(plain) || alike.includes(stem)) {
    throw fieldFault('password', 'This password is among the first that anybody tries. Take a few words that belong only to you.')
  }
}
