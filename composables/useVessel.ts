import type { VesselLedger } from '#shared/schemas/ledger'
import type { StackView } from '#shared/schemas/stack'
import type { VesselView } from '#shared/schemas/vessel'
import type { VesselEventView } from '#shared/schemas/vesselEvent'
import { failReading } from './problem'
import { onQuery } from './useVessels'

/** All that the page of a vessel tells. */
export interface VesselPage {
  vessel: VesselView
  stack: StackView
  ledger: VesselLedger
  events: VesselEventView[]
}

const keyOf = (id: string, on: string | null) => `vessel ${id} ${on ?? 'today'}`

/**
 * One vessel with its stack, ledger and events.
 *
 * @param on the day to look back to; null for today
 */
export function useVessel(id: string, on: () => string | null) {
  const api = useApi()
  const ready = useAsyncData(() => keyOf(id, on()), async (): Promise<VesselPage> => {
    const query = onQuery(on())
    const [vessel, stack, ledger, events] = await Promise.all([
      api<VesselView>(`/api/vessels/${id}`, { query }),
      api<StackView>(`/api/vessels/${id}/stack`, { query }),
      api<VesselLedger>(`/api/vessels/${id}/ledger`),
      api<VesselEventView[]>(`/api/vessels/${id}/events`),
    ]).catch(failReading)
    return { vessel, stack, ledger, events }
  })
  const { data: page, error, status, refresh } = ready
  /** Why it could not be read, in a sentence. */
  const why = computed(() => error.value?.message)
  const missing = computed(() => error.value?.statusCode === 404)
  return { page, why, missing, status, refresh, ready }
}

/** Forgets what was read of vessels, after one was changed: what is shown is read anew. */
export async function refreshVessels(): Promise<void> {
  clearNuxtData(key => key.startsWith('vessel ') && !key.endsWith('today'))
  await refreshNuxtData()
}
