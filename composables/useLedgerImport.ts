import type { ImportReport, LineFault } from '#shared/schemas/ledger'
import { isProblem } from './problem'
import { refreshVessels } from './useVessel'

/** Where a reading stands: nothing chosen, at work, told, or come to nothing. */
export type ImportState
  = | { kind: 'none' }
    | { kind: 'working', line: number, of: number, keeping: boolean }
    | { kind: 'told', report: ImportReport }
    | { kind: 'failed', why: string }

/** Taking in a ledger file: tried at once, kept only when every line is good, and stopped at any time. */
export function useLedgerImport() {
  const { me } = useMe()
  const router = useRouter()
  const file = shallowRef<File | null>(null)
  const state = shallowRef<ImportState>({ kind: 'none' })
  let stopping: AbortController | null = null

  async function choose(chosen: File): Promise<void> {
    file.value = chosen
    await run(true)
  }

  async function run(dryRun: boolean): Promise<void> {
    const chosen = file.value
    if (chosen === null) return
    stopping?.abort()
    const mine = stopping = new AbortController()
    const tell = (next: ImportState) => {
      if (stopping === mine) state.value = next
    }
    try {
      const of = (await chosen.text()).split('\n').filter(line => line.trim() !== '').length
      const at = (line: number) => tell({ kind: 'working', line, of, keeping: !dryRun })
      at(0)
      const response = await fetch(`/api/ledger/import?dryRun=${dryRun}`, {
        method: 'POST', headers: { 'content-type': 'text/csv', 'accept': 'application/x-ndjson' }, body: new Blob([chosen]), signal: mine.signal,
      })
      if (response.status === 401 && me.value) {
        me.value = null
        await router.push({ path: '/sign-in', query: { next: '/ledger' } })
        return
      }
      tell(outcome(await lastLine(response, at)))
      if (!dryRun) await refreshVessels()
    }
    catch {
      const why = mine.signal.aborted ? 'It was stopped.' : 'There is no network, or the file can no longer be read.'
      // Of a file that is sent again, what was kept the first time is passed over.
      tell({ kind: 'failed', why: `${why} ${dryRun ? 'Nothing was kept.' : 'Try it now: if it was kept already, nothing is kept twice.'}` })
    }
  }

  /** Breaks the reading off. */
  function stop(): void {
    stopping?.abort()
  }

  onBeforeUnmount(stop)

  return { file, state, choose, tryAgain: () => run(true), keep: () => run(false), stop }
}

/** Reads an answer line by line: how far it has come, and at the end the report or the problem. */
async function lastLine(response: Response, at: (line: number) => void): Promise<unknown> {
  const reader = response.body?.pipeThrough(new TextDecoderStream()).getReader()
  let rest = ''
  let last: unknown = null
  const take = (text: string) => {
    if (text.trim() === '') return
    last = JSON.parse(text)
    if (isRecord(last) && typeof last.line === 'number') at(last.line)
  }
  for (let part = await reader?.read(); part && !part.done; part = await reader?.read()) {
    const lines = (rest + part.value).split('\n')
    rest = lines.pop() ?? ''
    lines.forEach(take)
  }
  take(rest)
  return last
}

function outcome(answer: unknown): ImportState {
  if (isReport(answer)) return { kind: 'told', report: answer }
  if (!isProblem(answer)) return { kind: 'failed', why: 'Undercroft did not answer as it should. Nothing was kept.' }
  // What came between the trial and the keeping may have made a line wrong: it is told as the trial tells it.
  const faults = answer.errors.flatMap(({ line, column, message }): LineFault[] => line === undefined ? [] : [{ line, column: column ?? '', message }])
  const counted = { lines: 0, movements: 0, brews: 0, notes: 0, reversals: 0, moreErrors: 0, ...answer }
  if (faults.length > 0) return { kind: 'told', report: { lines: counted.lines, movements: counted.movements, brews: counted.brews, notes: counted.notes, reversals: counted.reversals, kept: false, errors: faults, moreErrors: counted.moreErrors } }
  return { kind: 'failed', why: `${answer.detail} Nothing was kept.` }
}

function isReport(value: unknown): value is ImportReport {
  return isRecord(value) && typeof value.kept === 'boolean' && typeof value.lines === 'number' && Array.isArray(value.errors)
}

function isRecord(value: unknown): value is Record<string, unknown> {
  return typeof value === 'object' && value !== null
}
