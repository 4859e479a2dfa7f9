import type { VesselEventView } from '#shared/schemas/vesselEvent'
import type { EventKind } from './eventWords'
import { EVENT_WORDS } from './eventWords'
import { plainDate } from './civilDate'
import { refreshVessels } from './useVessel'

interface EventFields { kind: EventKind | '', occurredOn: string, reason: string }

/** Recording what befell a vessel. The id is made once a form: what arrives twice is kept once. */
export function useVesselEvent(vessel: () => { id: string, name: string }, today: () => string) {
  const api = useApi()
  const undo = useUndoStore()
  const id = ref(newId())

  const form = useForm({
    initial: (): EventFields => ({ kind: '', occurredOn: today(), reason: '' }),
    send: ({ kind, occurredOn, reason }): Promise<VesselEventView> => api(`/api/vessels/${vessel().id}/events`, {
      method: 'POST',
      body: { id: id.value, kind, occurredOn, ...(reason.trim() === '' ? {} : { reason }) },
    }),
    async done(event) {
      id.value = newId()
      Object.assign(form.values, { kind: '', occurredOn: today(), reason: '' })
      undo.tell(`${vessel().name}: ${EVENT_WORDS[event.kind].toLowerCase()}, ${plainDate(event.occurredOn)}. Kept.`)
      await refreshVessels()
    },
  })
  return form
}
