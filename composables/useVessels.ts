import { v7 } from 'uuid'
import type { VesselChange, VesselView } from '#shared/schemas/vessel'
import { failReading } from './problem'

/** A value of a vessel's form as it is sent: a number field that holds no number goes as it was typed, for the server to speak of. */
type AsTyped<Values> = { [Field in keyof Values]: Values[Field] extends number | undefined ? number | string | undefined : Values[Field] }
export type VesselValues = AsTyped<{ name: string, kind: VesselView['kind'], workingLitres: number, wood: boolean, walkingOrder?: number }>

const KEY = 'vessels'

/**
 * All vessels of the cellar, in walking order, with their layers. `ready` is there for a page that cannot begin without them.
 *
 * @param on the day to look back to; null for today
 */
export function useVessels({ lazy = false, on = () => null }: { lazy?: boolean, on?: () => string | null } = {}) {
  const api = useApi()
  const ready = useAsyncData(
    () => on() === null ? KEY : `${KEY} on ${on()}`,
    (): Promise<VesselView[]> => api<VesselView[]>('/api/vessels', { query: { layers: 'true', ...onQuery(on()) } }).catch(failReading),
    { lazy },
  )
  const { data: vessels, error, status, refresh } = ready
  /** Why they could not be read, in a sentence. */
  const why = computed(() => error.value?.message)
  return { vessels, why, status, refresh, ready }
}

/** The day of a question, if it is not today. */
export function onQuery(on: string | null): { on?: string } {
  return on === null ? {} : { on }
}

/** What may be done to a vessel. Each answers with the vessel as it then is. */
export function useVesselActs() {
  const api = useApi()

  function add(id: string, values: VesselValues): Promise<VesselView> {
    return api('/api/vessels', { method: 'POST', body: { id, ...values } })
  }

  function change(id: string, version: VesselChange['version'], values: Partial<VesselValues>): Promise<VesselView> {
    return api(`/api/vessels/${id}`, { method: 'PATCH', body: { version, ...values } })
  }

  async function takeAway({ id, version }: Pick<VesselView, 'id' | 'version'>): Promise<void> {
    await api(`/api/vessels/${id}`, { method: 'DELETE', query: { version } })
  }

  /** Puts a vessel that was taken away back, under an id of its own: the old one is spent. */
  function putBack({ name, kind, workingLitres, wood, walkingOrder }: VesselView): Promise<VesselView> {
    return add(newId(), { name, kind, workingLitres, wood, walkingOrder })
  }

  return { add, change, takeAway, putBack, refresh: () => refreshNuxtData(KEY) }
}

/** An id for something that this browser makes. */
export function newId(): string {
  return v7()
}
