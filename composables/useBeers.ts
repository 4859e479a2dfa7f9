import type { BeerView } from '#shared/schemas/brew'
import { beerSigns } from './layers'

/** The beers of the brewery, each with its hatch. */
export function useBeers({ lazy = false } = {}) {
  const api = useApi()
  const ready = useAsyncData('beers', (): Promise<BeerView[]> => api('/api/beers'), { lazy })
  const { data: list, error, refresh } = ready
  const beers = computed(() => beerSigns(list.value ?? []))
  return { list, beers, error, refresh, ready }
}
