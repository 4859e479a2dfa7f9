import { getCookie, unsealSession, type H3Event, type SessionConfig } from 'h3'
import { SESSION_DAYS } from '#server/commands/session'
import { hashToken } from '#server/security/secrets'
import { settings } from './settings'

let config: SessionConfig & { name: string } | undefined

function cookieConfig(): SessionConfig & { name: string } {
  if (config) return config
  const { secure, sessionPassword } = settings()
  if (!sessionPassword) throw new Error('NUXT_SESSION_PASSWORD is not set: nobody could sign in.')
  config = {
    name: secure ? '__Host-undercroft' : 'undercroft',
    password: sessionPassword,
    maxAge: SESSION_DAYS * 86_400,
    // The cookie alone says who one is, never a header.
    sessionHeader: false,
    cookie: { path: '/', httpOnly: true, sameSite: 'lax', secure },
  }
  return config
}

/** Hand the browser its session's token, sealed. */
export async function giveSessionCookie(event: H3Event, token: string): Promise<void> {
  await replaceUserSession(event, { secure: { token } }, cookieConfig())
}

/** Take the cookie off the browser. */
export async function dropSessionCookie(event: H3Event): Promise<void> {
  await clearUserSession(event, cookieConfig())
}

/** The hash of the token that a request carries, or null if it carries none that we sealed. Whether its session still stands only the database knows. */
export async function sessionHashOf(event: H3Event): Promise<string | null> {
  const sealed = getCookie(event, cookieConfig().name)
  if (!sealed) return null
  const known = unsealed.get(sealed)
  if (known !== undefined) return known
  try {
    const { data } = await unsealSession(event, cookieConfig(), sealed)
    const token: unknown = data?.secure?.token
    if (typeof token !== 'string') return null
    const hash = hashToken(token)
    remember(sealed, hash)
    return hash
  }
  catch {
    return null
  }
}

// Unsealing costs more than the rest of a small request, and always gives the same for the same cookie. This remembers no
// session: that one is over is seen in the database on the very next request.
const unsealed = new Map<string, string>()
const REMEMBERED = 500

function remember(sealed: string, hash: string): void {
  if (unsealed.size >= REMEMBERED) {
    const [oldest] = unsealed.keys()
    if (oldest !== undefined) unsealed.delete(oldest)
  }
  unsealed.set(sealed, hash)
}
