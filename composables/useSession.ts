import type { Me, SignIn } from '#shared/schemas/auth'
import { failureOf } from './problem'

/** Coming in, going out, and which brewery one is in. */
export function useSession() {
  const api = useApi()
  const { me } = useMe()
  const drafts = useDraftStore()
  const undo = useUndoStore()

  /** Asks who is signed in. */
  async function load(): Promise<void> {
    try {
      me.value = await api<Me>('/api/me')
    }
    catch (thrown) {
      const failure = failureOf(thrown)
      if (failure.kind !== 'problem' || failure.problem.status !== 401) throw thrown
      me.value = null
    }
  }

  async function signIn(body: SignIn): Promise<void> {
    enter(await api<Me>('/api/auth/sign-in', { method: 'POST', body }))
  }

  async function chooseBrewery(breweryId: string): Promise<void> {
    enter(await api<Me>('/api/auth/brewery', { method: 'POST', body: { breweryId } }))
  }

  async function signOut(): Promise<void> {
    await api('/api/auth/sign-out', { method: 'POST', body: {} })
    leave()
  }

  async function signOutEverywhere(): Promise<void> {
    await api('/api/auth/sign-out-everywhere', { method: 'POST', body: {} })
    leave()
  }

  /** What was read for one person or brewery must not be shown to the next. */
  function enter(person: Me): void {
    clearNuxtData()
    undo.clear()
    me.value = person
  }

  function leave(): void {
    clearNuxtData()
    undo.clear()
    drafts.clear()
    me.value = null
  }

  return { load, signIn, chooseBrewery, signOut, signOutEverywhere, enter }
}
