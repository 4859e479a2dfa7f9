import { FetchError } from 'ofetch'
import type { VesselView } from '#shared/schemas/vessel'
import type { Problem } from '#shared/types/problem'

/** Why a call came to nothing: the server's own account of it, no way to the server, or an answer that makes no sense. */
export type Failure
  = | { kind: 'problem', problem: Problem }
    | { kind: 'offline' }
    | { kind: 'broken' }

/** What a thrown value of a call means. */
export function failureOf(thrown: unknown): Failure {
  if (!(thrown instanceof FetchError)) return { kind: 'broken' }
  if (thrown.response === undefined) return { kind: 'offline' }
  const body: unknown = thrown.data
  return isProblem(body) ? { kind: 'problem', problem: body } : { kind: 'broken' }
}

/** One sentence on a failed call, in words that are ours or that the server wrote for a person to read. */
export function failureSentence(failure: Failure): string {
  if (failure.kind === 'offline') return 'No network. What you typed is kept here; try again.'
  if (failure.kind === 'broken' || failure.problem.status >= 500) return 'Undercroft could not do this just now. What you typed is kept here; try again.'
  return failure.problem.detail
}

/** Whether an unknown value is a vessel, as far as the face needs to know. */
export function isVesselView(value: unknown): value is VesselView {
  return isRecord(value) && typeof value.id === 'string' && typeof value.name === 'string'
    && typeof value.version === 'number' && typeof value.workingLitres === 'number'
}

export function isProblem(value: unknown): value is Problem {
  return isRecord(value) && typeof value.status === 'number' && typeof value.code === 'string'
    && typeof value.detail === 'string' && Array.isArray(value.errors)
}

function isRecord(value: unknown): value is Record<string, unknown> {
  return typeof value === 'object' && value !== null
}

/**
 * Ends a reading that came to nothing with an error whose message is a sentence for a person. Said where it is caught:
 * on its way to the page an error loses what it was.
 */
export function failReading(thrown: unknown): never {
  const failure = failureOf(thrown)
  throw createError({ statusCode: failure.kind === 'problem' ? failure.problem.status : 503, message: readingSentence(failure) })
}

function readingSentence(failure: Failure): string {
  if (failure.kind === 'offline') return 'There is no network.'
  return failure.kind === 'problem' && failure.problem.status < 500 ? failure.problem.detail : 'Undercroft did not answer as it should.'
}
