import type { BrewView } from '#shared/schemas/brew'
import { plainNumber } from './plainNumber'

interface BrewFields { beerCode: string, ageBandDays: string }

const fieldsOf = ({ beerCode, ageBandDays }: BrewView): BrewFields => ({ beerCode: beerCode ?? '', ageBandDays: ageBandDays === null ? '' : String(ageBandDays) })

/** Saying which beer a brew is of, and how well its day is known. */
export function useBrewChange(brew: BrewView, done: (kept: BrewView) => void) {
  const api = useApi()
  const undo = useUndoStore()
  const before = fieldsOf(brew)

  const send = ({ version, beerCode, ageBandDays }: BrewFields & { version: number }): Promise<BrewView> => api(`/api/brews/${brew.id}`, {
    method: 'PATCH',
    body: { version, beerCode: beerCode === '' ? null : beerCode, ageBandDays: ageBandDays.trim() === '' ? null : plainNumber(ageBandDays) },
  })

  return useForm({
    initial: (): BrewFields => ({ ...before }),
    send: (fields: BrewFields) => send({ ...fields, version: brew.version }),
    async done(kept): Promise<void> {
      done(kept)
      await refreshNuxtData()
      if (kept.version === brew.version) return
      undo.offerUndo({
        subject: kept.code,
        words: 'is kept as changed.',
        undo: () => send({ ...before, version: kept.version }).then(() => refreshNuxtData()),
        undone: `${kept.code} is as it was before.`,
      })
    },
  })
}
