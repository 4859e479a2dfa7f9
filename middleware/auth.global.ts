import type { Ability } from '#shared/abilities'
import { can } from '#shared/abilities'

declare module '#app' {
  interface PageMeta {
    /** Open to somebody who is not signed in. */
    open?: boolean
    /** What a role must be allowed to do to see the page. */
    ability?: Ability
  }
}

/** Shows everybody to the right door. Comfort only: the server asks who is there at each call. */
export default defineNuxtRouteMiddleware(async (to) => {
  const app = useNuxtApp()
  // The server has judged already, and shows why.
  if (import.meta.client && app.isHydrating && app.payload.error) return
  const { me } = useMe()
  const session = useSession()
  if (me.value === undefined) await session.load()

  if (!me.value) {
    if (to.meta.open) return
    if (to.path === '/' && (await useSetUp().state()).open) return navigateTo('/set-up')
    return navigateTo({ path: '/sign-in', query: to.path === '/' ? {} : { next: to.fullPath } })
  }
  if (to.path === '/sign-in') return navigateTo(nextPath(to.query.next) ?? '/', { replace: true })
  if (me.value.role === null) {
    return to.path === '/breweries' || to.path === '/you' ? undefined : navigateTo('/breweries')
  }
  if (to.path === '/') return navigateTo(firstScreen(me.value.role), { replace: true })
  if (to.meta.ability !== undefined && !can(me.value.role, to.meta.ability)) {
    return abortNavigation(createError({ statusCode: 403, statusMessage: 'Not for this role' }))
  }
})
