export interface CallOptions {
  method?: 'POST' | 'PATCH' | 'DELETE'
  body?: object
  query?: Record<string, string | number>
}

/** Asks the API. The caller says what comes back: the types are those of the schemas that the routes are held to. */
export type Api = <Answer>(path: string, options?: CallOptions) => Promise<Answer>

/**
 * The way to the API. While a page is rendered it carries the reader's cookie; in the browser it takes a person whose
 * session has ended to the door, with the way back in hand.
 */
export function useApi(): Api {
  if (import.meta.server) {
    const fetchAsReader = useRequestFetch()
    return <Answer>(path: string, options: CallOptions = {}) => fetchAsReader<Answer>(path, options)
  }
  const { me } = useMe()
  const router = useRouter()

  async function leave(): Promise<void> {
    me.value = null
    await router.push({ path: '/sign-in', query: { next: router.currentRoute.value.fullPath } })
  }

  return <Answer>(path: string, options: CallOptions = {}) => $fetch<Answer>(path, {
    ...options,
    // A change is sent again by a person, never by itself.
    retry: 0,
    async onResponseError({ response }) {
      if (response.status === 401 && me.value) await leave()
    },
  })
}
