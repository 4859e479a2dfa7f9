/** Something a person can put right. Shown as its sentence alone, without a stack. */
export class Failure extends Error {}

/** What went wrong: a sentence where we have one, all that is known where we don't. */
export function explain(error: unknown): string {
  if (error instanceof Failure) return error.message
  if (!(error instanceof Error)) return String(error)
  const own = error.stack ?? error.message
  return error.cause === undefined ? own : `${own}\nfrom: ${explain(error.cause)}`
}

/** What went wrong in one line, with what it came from: for failures outside of us, whose stack helps nobody. */
export function explainShortly(error: unknown): string {
  if (error instanceof AggregateError && error.message === '') return error.errors.map(explainShortly).join('; ')
  if (!(error instanceof Error)) return String(error)
  return error.cause === undefined ? error.message : `${error.message}: ${explainShortly(error.cause)}`
}
