import type { ActReversed, MovementReversed, VesselChangeView } from '#shared/schemas/ledger'
import type { LedgerAct, LedgerRow } from './ledgerLines'
import { refreshVessels } from './useVessel'

export type Correction = ReturnType<typeof useCorrection>

/** Striking a line of the ledger out, or all lines of its act: why, and what that changed. */
export function useCorrection(vessel: () => { id: string, name: string } | null) {
  const acts = useActs()
  const api = useApi()
  const asked = shallowRef<{ act: LedgerAct, row: LedgerRow } | null>(null)
  /** What it changed, once it is done. */
  const changed = shallowRef<VesselChangeView[] | null>(null)
  const names = shallowRef<Record<string, string>>({})
  const id = ref(newId())

  const form = useForm({
    initial: (): { whole: 'line' | 'act', reason: string } => ({ whole: 'line', reason: '' }),
    async send({ whole, reason }): Promise<VesselChangeView[]> {
      const what = asked.value
      if (what === null) return []
      const { changed } = whole === 'act'
        ? await acts.reverseAct(what.act.id, { id: id.value, reason })
        : await api<MovementReversed>(`/api/movements/${what.row.line.id}/reverse`, { method: 'POST', body: { id: id.value, reason } })
      return changed
    },
    async done(result) {
      names.value = { ...namesIn(asked.value), ...(vessel() ? { [vessel()?.id ?? '']: vessel()?.name ?? '' } : {}) }
      changed.value = result
      await refreshVessels()
    },
  })

  function ask(act: LedgerAct, row: LedgerRow): void {
    id.value = newId()
    changed.value = null
    Object.assign(form.values, { whole: 'line', reason: '' })
    asked.value = { act, row }
  }

  return { asked, changed, names, form, ask, close: () => (asked.value = null) }
}

/** The names of the vessels that the lines of an act speak of. */
function namesIn(asked: { act: LedgerAct } | null): Record<string, string> {
  const lines = asked?.act.rows.map(({ line }) => line) ?? []
  return Object.fromEntries(lines.flatMap(({ vesselId, vesselName, toVesselId, toVesselName }) => [[vesselId, vesselName], ...toVesselId !== null && toVesselName !== null ? [[toVesselId, toVesselName]] : []]))
}

/** What is recorded of the beer, and how it is struck out. */
export function useActs() {
  const api = useApi()

  function reverseAct(actId: string, body: { id: string, reason: string }): Promise<ActReversed> {
    return api(`/api/acts/${actId}/reverse`, { method: 'POST', body })
  }

  return { reverseAct }
}
