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
  }
}

/** The fault behind an error; for whatever we did not throw ourselves, one that tells nothing. */
export function faultOf(error: unknown): Fault {
  if (error instanceof Fault) return error
  if (error instanceof Error && error.cause instanceof Fault) return error.cause
  if (isError(error) && !error.unhandled) {
    if (error.statusCode === 404) return new Fault('notFound', 'There is nothing under this address.')
    if (error.statusCode === 405) return new Fault('methodNotAllowed', 'This address does not take that method.')
    if (error.statusCode === 400) return new Fault('unreadable', 'This could not be read.')
  }
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
