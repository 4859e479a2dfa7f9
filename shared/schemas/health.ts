import { z } from 'zod'
import { Instant } from './fields'

/** How the installation is. Parts that it does not have yet are null. */
export const Health = z.object({
  status: z.enum(['ok', 'starting', 'failing']),
  database: z.enum(['ok', 'failing']),
  migrations: z.enum(['ok', 'pending']).nullable(),
  mailQueue: z.enum(['ok', 'failing']).nullable(),
  lastDerivedAt: Instant.nullable(),
})
export type Health = z.output<typeof Health>
