import pino, { type Logger } from 'pino'
import { settings } from './settings'

let log: Logger | undefined

/** The server's log: one line of JSON an event, without personal data. */
export function useLog(): Logger {
  log ??= pino({
    level: settings().logLevel,
    base: { pid: process.pid },
    timestamp: pino.stdTimeFunctions.isoTime,
    serializers: { err: describe },
  }, pino.destination({ sync: false }))
  return log
}

/** An error as it may stand in a log: addresses with a password in them lose it, and so do e-mail addresses. */
function describe(error: unknown): Record<string, unknown> {
  if (!(error instanceof Error)) return { message: clean(String(error)) }
  return {
    type: error.name,
    message: clean(error.message),
    stack: clean(error.stack ?? ''),
    ...('code' in error && { code: error.code }),
    // The query builder puts the values of a statement into its message; the cause says what is needed.
    ...(error.cause !== undefined && { cause: describe(error.cause) }),
  }
}

function clean(text: string): string {
  return text
    .replace(/:\/\/[^@\s/]*@/g, '://…@')
    .replace(/^params: .*$/gm, 'params: …')
    .replace(/[^\s@<>"']+@[^\s@<>"']+\.[a-z]+/gi, '…@…')
}
