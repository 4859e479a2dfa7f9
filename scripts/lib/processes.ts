import { setTimeout as sleep } from 'node:timers/promises'
import { z } from 'zod'
import { readIfThere } from './files'

/** A process by its number and the moment it began: a number alone may be another process's by now. */
export const ProcessMark = z.object({ pid: z.number().int().positive(), began: z.string() })
export type ProcessMark = z.output<typeof ProcessMark>

/** The mark of a living process, undefined if there is none of that number. */
export function markOf(pid: number): ProcessMark | undefined {
  // The name in brackets may itself hold spaces and brackets, so the fields are counted from its end.
  const fields = readIfThere(`/proc/${pid}/stat`)?.replace(/^.*\) /s, '').split(' ')
  const state = fields?.[0]
  const began = fields?.[19]
  if (began === undefined || state === 'Z') return undefined
  return { pid, began }
}

export function isAlive(mark: ProcessMark): boolean {
  return markOf(mark.pid)?.began === mark.began
}

/** Wait until a process is gone; false if it is still there after so long. */
export async function isGoneWithin(mark: ProcessMark, milliseconds: number): Promise<boolean> {
  const giveUp = Date.now() + milliseconds
  while (isAlive(mark)) {
    if (Date.now() >= giveUp) return false
    await sleep(50)
  }
  return true
}

/** Ask a process to end and, where it does not within its time, end it. With `group` its children are ended with it. */
export async function endProcess(mark: ProcessMark, options: { ask: NodeJS.Signals, patience: number, insist: NodeJS.Signals, group?: boolean }): Promise<void> {
  send(mark, options.ask, options.group)
  if (await isGoneWithin(mark, options.patience)) return
  send(mark, options.insist, options.group)
  await isGoneWithin(mark, options.patience)
}

function send(mark: ProcessMark, signal: NodeJS.Signals, group = false): void {
  if (!isAlive(mark)) return
  try {
    process.kill(group ? -mark.pid : mark.pid, signal)
  }
  catch (error) {
    // It ended between the two lines.
    if (!(error instanceof Error && 'code' in error && error.code === 'ESRCH')) throw error
  }
}
