import { writeSync } from 'node:fs'
import type { Readable } from 'node:stream'
import { createInterface } from 'node:readline'
import { z } from 'zod'

const Line = z.object({ level: z.union([z.number(), z.string()]), msg: z.string() })
const WARNING = 40

/** Keep all that a server writes in its log; what a person should see is shown as well. */
export function keepLog(stream: Readable, log: number): void {
  createInterface({ input: stream }).on('line', (line) => {
    writeSync(log, `${line}\n`)
    const shown = worthShowing(line)
    if (shown !== undefined) console.error(shown)
  })
}

/** The words of a warning or an error, undefined for the rest. What is not a log line comes from Node itself: it is shown. */
export function worthShowing(line: string): string | undefined {
  const read = Line.safeParse(parsed(line))
  if (!read.success) return line.startsWith('Listening on ') ? undefined : line
  const { level, msg } = read.data
  const isWarning = typeof level === 'number' ? level >= WARNING : ['warn', 'error', 'fatal'].includes(level)
  return isWarning ? `server: ${msg}` : undefined
}

function parsed(line: string): unknown {
  try {
    return JSON.parse(line)
  }
  catch {
    return undefined
  }
}
