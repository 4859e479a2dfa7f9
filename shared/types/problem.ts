/** What an answer that is not the asked-for one says of itself, in one word. One table maps it to a status. */
export const PROBLEMS = {
  unreadable: 400,
  signedOut: 401,
  wrongSignIn: 401,
  forbidden: 403,
  foreignOrigin: 403,
  notFound: 404,
  methodNotAllowed: 405,
  tooSlow: 408,
  stale: 409,
  sameIdOtherContent: 409,
  inUse: 409,
  alreadyDone: 409,
  tooLarge: 413,
  unsupportedType: 415,
  invalid: 422,
  tooMany: 429,
  failed: 500,
  unavailable: 503,
} as const satisfies Record<string, number>

export type ProblemCode = keyof typeof PROBLEMS

/** A fault of one field of what was sent. `field` is a path as `movements.0.litres`. */
export interface FieldFault {
  field: string
  message: string
  /** Of a file. */
  line?: number
  column?: string
}

/** RFC 9457, with our own members: `code`, `errors`, and what a stale writer needs to see, `current`. */
export interface Problem {
  type: string
  title: string
  status: number
  detail: string
  code: ProblemCode
  errors: FieldFault[]
  current?: unknown
}
