import { mkdirSync, openSync, readFileSync, renameSync, statSync, writeFileSync, fsyncSync, closeSync } from 'node:fs'
import { dirname } from 'node:path'

/** The text of a file, or undefined where there is none. */
export function readIfThere(path: string): string | undefined {
  try {
    return readFileSync(path, 'utf8')
  }
  catch (error) {
    if (isMissing(error)) return undefined
    throw error
  }
}

/** Write a file so that a reader, or a crash in the middle, meets the old content or the new, never a half. */
export function writeWhole(path: string, text: string, mode: number): void {
  const draft = `${path}.new`
  const file = openSync(draft, 'w', mode)
  try {
    writeFileSync(file, text)
    fsyncSync(file)
  }
  finally {
    closeSync(file)
  }
  renameSync(draft, path)
}

const LARGE_LOG_BYTES = 20_000_000

/** Open a log for adding to it. A large one is put aside first, so that a log never fills the disk: one older log is kept. */
export function openLog(path: string): number {
  mkdirSync(dirname(path), { recursive: true, mode: 0o700 })
  if ((statSync(path, { throwIfNoEntry: false })?.size ?? 0) > LARGE_LOG_BYTES) renameSync(path, `${path}.1`)
  return openSync(path, 'a', 0o600)
}

export function isMissing(error: unknown): boolean {
  return error instanceof Error && 'code' in error && error.code === 'ENOENT'
}
