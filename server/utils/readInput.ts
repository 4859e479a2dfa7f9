import type { z } from 'zod'
import { words } from '#shared/schemas/words'
import { Fault } from '#shared/types/fault'

/** Read `value` through a schema. Throws `invalid` with a human word at each field that is not right. */
export function readInput<Schema extends z.ZodType>(schema: Schema, value: unknown): z.output<Schema> {
  const read = schema.safeParse(value, { error: words })
  if (read.success) return read.data
  throw new Fault('invalid', 'Something in what was sent is not right.', { errors: read.error.issues.flatMap(faultsOf) })
}

function faultsOf(issue: z.core.$ZodIssue): { field: string, message: string }[] {
  if (issue.code === 'unrecognized_keys') {
    return issue.keys.map(key => ({ field: [...issue.path, key].join('.'), message: issue.message }))
  }
  return [{ field: issue.path.join('.'), message: issue.message }]
}
