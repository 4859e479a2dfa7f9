import type { StackView } from '#shared/schemas/stack'
import { failReading } from './problem'
import { onQuery } from './useVessels'

/** What is in a vessel on a day, without its ledger: for a form that shows what an act would do. */
export function useStack(id: () => string | null, on: () => string | null) {
  const api = useApi()
  const ready = useAsyncData(
    () => `stack ${id() ?? 'none'} ${on() ?? 'today'}`,
    async (): Promise<StackView | null> => {
      const vessel = id()
      return vessel === null ? null : api<StackView>(`/api/vessels/${vessel}/stack`, { query: onQuery(on()) }).catch(failReading)
    },
  )
  return { stack: ready.data, ready }
}
