import { resolve } from 'node:path'
import { z } from 'zod'

const address = z.url({ protocol: /^postgres(ql)?$/, error: 'must be a postgres:// address' })

/**
 * Everything that the environment may say, with the defaults. Read once, at the first call of `settings()`;
 * no other file reads `process.env` for itself.
 */
const Settings = z.object({
  PORT: z.coerce.number().int().min(1).max(65535).default(3000),
  HOST: z.string().min(1).default('127.0.0.1'),
  UNDERCROFT_DATA: z.string().min(1).default('.data').transform(folder => resolve(folder)),
  UNDERCROFT_NOW: z.iso.datetime({ offset: true }).optional(),
  UNDERCROFT_ORIGIN: z.url({ protocol: /^https?$/ }).transform(url => new URL(url).origin).optional(),
  UNDERCROFT_DEMO: z.enum(['load', 'none']).default('none'),
  /** How many proxies of our own stand before the server; the client's address is read that far from the right of X-Forwarded-For. */
  UNDERCROFT_TRUSTED_PROXIES: z.coerce.number().int().min(0).max(5).default(0),
  UNDERCROFT_LOG: z.enum(['trace', 'debug', 'info', 'warn', 'error', 'silent']).default('info'),
  UNDERCROFT_DATABASE_CONNECTIONS: z.coerce.number().int().min(1).max(200).default(10),
  DATABASE_URL: address.optional(),
  DATABASE_OWNER_URL: address.optional(),
  SMTP_URL: z.url({ protocol: /^smtps?$/ }).optional(),
  NUXT_SESSION_PASSWORD: z.string().min(32).optional(),
}).transform((read, ctx) => {
  const origin = read.UNDERCROFT_ORIGIN ?? `http://localhost:${read.PORT}`
  const secure = origin.startsWith('https:')
  if (read.UNDERCROFT_DEMO === 'load' && (secure || !isLoopback(read.HOST))) {
    ctx.addIssue({ code: 'custom', path: ['UNDERCROFT_DEMO'], message: 'the demo opens with a known password: it is loaded only where HOST is loopback and the origin is http; set UNDERCROFT_DEMO=none' })
    return z.NEVER
  }
  return {
    port: read.PORT,
    host: read.HOST,
    dataFolder: read.UNDERCROFT_DATA,
    /** Where the application's clock stands at boot, as an ISO instant; the machine's clock if not given. */
    startsAt: read.UNDERCROFT_NOW,
    origin,
    secure,
    demo: read.UNDERCROFT_DEMO,
    trustedProxies: read.UNDERCROFT_TRUSTED_PROXIES,
    logLevel: read.UNDERCROFT_LOG,
    databaseConnections: read.UNDERCROFT_DATABASE_CONNECTIONS,
    databaseUrl: read.DATABASE_URL,
    databaseOwnerUrl: read.DATABASE_OWNER_URL,
    smtpUrl: read.SMTP_URL,
    sessionPassword: read.NUXT_SESSION_PASSWORD,
  }
})

export type Settings = z.output<typeof Settings>

/** Read settings out of an environment. Throws one plain sentence that names each variable at fault, never its value. */
export function readSettings(environment: Record<string, string | undefined>): Settings {
  const present = Object.fromEntries(Object.entries(environment).filter(([, value]) => value !== undefined && value !== ''))
  const read = Settings.safeParse(present)
  if (read.success) return read.data
  throw new Error(`The environment is not right. ${read.error.issues.map(issue => `${issue.path.join('.')}: ${issue.message}`).join('; ')}`)
}

let known: Settings | undefined

/** The settings of this process. */
export function settings(): Settings {
  known ??= readSettings(process.env)
  return known
}

function isLoopback(host: string): boolean {
  return host === 'localhost' || host === '::1' || /^127\.\d+\.\d+\.\d+$/.test(host)
}
