import type { BrewView } from '#shared/schemas/brew'
import { failReading } from './problem'

/** All brews, newest first, and where each still is. */
export function useBrews({ lazy = false } = {}) {
  const api = useApi()
  const ready = useAsyncData('brews', (): Promise<BrewView[]> => api<BrewView[]>('/api/brews').catch(failReading), { lazy })
  const { data: brews, error, status, refresh } = ready
  const why = computed(() => error.value?.message)
  return { brews, why, status, refresh, ready }
}
