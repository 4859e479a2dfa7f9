import { getRequestHeader, type H3Event } from 'h3'
import type { Caller } from '#server/commands/signIn'
import { keyedHash } from '#server/security/secrets'
import { sessionHashOf } from './sessionCookie'
import { settings } from './settings'

/** Where a sign-in comes from, as throttling counts it. `account` is the address as typed. */
export async function callerOf(event: H3Event, account: string, now: Date): Promise<Caller> {
  const key = settings().sessionPassword ?? ''
  return {
    addressHash: keyedHash(key, networkAddressOf(event)),
    accountHash: keyedHash(key, account.trim().toLowerCase()),
    oldSessionHash: await sessionHashOf(event),
    now,
  }
}

/**
 * The network address of the client. X-Forwarded-For is written by whoever sends it, up to the proxies of our own: only
 * so many entries from its right as there are such proxies are believed.
 */
export function networkAddressOf(event: H3Event): string {
  const peer = event.node.req.socket.remoteAddress ?? 'unknown'
  const { trustedProxies } = settings()
  if (trustedProxies === 0) return peer
  const hops = (getRequestHeader(event, 'x-forwarded-for') ?? '').split(',').map(hop => hop.trim()).filter(Boolean)
  return hops.at(-trustedProxies) ?? peer
}
