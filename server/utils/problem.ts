import { isError, setResponseHeader, setResponseStatus, type H3Event } from 'h3'
import { Fault } from '#shared/types/fault'
import { PROBLEMS, type Problem, type ProblemCode } from '#shared/types/problem'

const TITLES: Record<ProblemCode, string> = {
  unreadable: 'It could not be read',
  signedOut: 'Not signed in',
  wrongSignIn: 'Not signed in',
  forbidden: 'Not allowed',
  foreignOrigin: 'Not from here',
  notFound: 'Not found',
  methodNotAllowed: 'Not done this way',
  tooSlow: 'Too slow',
  stale: 'Somebody was first',
  sameIdOtherContent: 'Kept already, and other',
  inUse: 'In use',
  alreadyDone: 'Done already',
  tooLarge: 'Too large',
  unsupportedType: 'Not a kind that is taken',
  invalid: 'Something is not right',
  tooMany: 'Too many',
  failed: 'It failed',
  unavailable: 'Away for a moment',
}

/** An error as it may go out: what we said ourselves, or nothing but that it failed. */
export function problemOf(error: unknown): Problem {
  const fault = faultOf(error)
  const status = PROBLEMS[fault.code]
  return {
    type: 'about:blank',
    title: TITLES[fault.code],
    status,
    detail: fault.message,
    code: fault.code,
    errors: fault.errors,
    ...(fault.current !== undefined && { current: fault.current }),
    ...fault.members,
  }
}

/** What the framework itself refuses, and what a page hands on that the API refused it: told by the status alone. */
const BY_STATUS: Partial<Record<number, { code: ProblemCode, detail: string }>> = {
  400: { code: 'unreadable', detail: 'This could not be read.' },
  401: { code: 'signedOut', detail: 'You are not signed in, or no longer.' },
  403: { code: 'forbidden', detail: 'Your role does not allow this here.' },
  404: { code: 'notFound', detail: 'There is nothing under this address.' },
  405: { code: 'methodNotAllowed', detail: 'This address does not take that method.' },
  503: { code: 'unavailable', detail: 'The database does not answer. Try again in a moment.' },
}

/** The fault behind an error; for whatever we did not throw ourselves, one that tells nothing. */
export function faultOf(error: unknown): Fault {
  if (error instanceof Fault) return error
  if (error instanceof Error && error.cause instanceof Fault) return error.cause
  const known = isError(error) ? BY_STATUS[error.statusCode] : undefined
  if (known) return new Fault(known.code, known.detail)
  return new Fault('failed', 'Something went wrong here. It has been noted; try again in a moment.')
}

/** Answer a request with a problem. */
export function writeProblem(event: H3Event, error: unknown): string {
  const problem = problemOf(error)
  setResponseStatus(event, problem.status)
  setResponseHeader(event, 'content-type', 'application/problem+json')
  const { retryAfterSeconds } = faultOf(error)
  if (retryAfterSeconds !== undefined) setResponseHeader(event, 'retry-after', retryAfterSeconds)
  return JSON.stringify(problem)
}
