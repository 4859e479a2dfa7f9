import { rmSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { z } from 'zod'
import { readIfThere, writeWhole } from './files'
import { ProcessMark } from './processes'

const Run = z.object({
  server: ProcessMark,
  /** How far the application's clock is ahead of the machine's, in milliseconds. */
  clockAhead: z.number(),
})
export type Run = z.output<typeof Run>

/** What the present start, or a killed one, runs from this data folder; undefined if nothing does. */
export function readRun(dataFolder: string): Run | undefined {
  const text = readIfThere(runFile(dataFolder))
  return text === undefined ? undefined : Run.parse(JSON.parse(text))
}

export function writeRun(dataFolder: string, run: Run): void {
  writeWhole(runFile(dataFolder), `${JSON.stringify(run)}\n`, 0o600)
}

export function removeRun(dataFolder: string): void {
  rmSync(runFile(dataFolder), { force: true })
}

/** Tell the next start what this one is doing. Written in place, since scripts/start holds its lock on this very file. */
export function tellNextStart(dataFolder: string, state: 'running' | 'stopping', address: string): void {
  writeFileSync(join(dataFolder, 'start.lock'), `${state} ${process.pid} ${address}\n`)
}

function runFile(dataFolder: string): string {
  return join(dataFolder, 'run.json')
}
