import type { FieldFault, ProblemCode } from './problem'

/**
 * Thrown by commands and queries when what was asked cannot be done, in words a person can read. It knows nothing of
 * HTTP: the edge maps `code` to a status. Never carries a message of the driver or of another library.
 */
export class Fault extends Error {
  override readonly name = 'Fault'
  readonly errors: FieldFault[]
  readonly current: unknown
  readonly retryAfterSeconds: number | undefined
  /** Further members of the problem that is answered. */
  readonly members: Record<string, unknown>

  constructor(readonly code: ProblemCode, detail: string, more: { errors?: FieldFault[], current?: unknown, retryAfterSeconds?: number, members?: Record<string, unknown> } = {}) {
    super(detail)
    this.errors = more.errors ?? []
    this.current = more.current
    this.retryAfterSeconds = more.retryAfterSeconds
    this.members = more.members ?? {}
  }
}

/** The fault of one field. */
export function fieldFault(field: string, message: string): Fault {
  return new Fault('invalid', message, { errors: [{ field, message }] })
}
