import type { Ability } from '#shared/abilities'
import { can } from '#shared/abilities'
import type { Me } from '#shared/schemas/auth'

/** Who is signed in. `undefined` until it has been asked, `null` when nobody is. */
export function useMe() {
  const me = useState<Me | null | undefined>('me', () => undefined)
  const role = computed(() => me.value?.role ?? null)

  /** Whether the person may do something. Only for what is shown: the server asks again. */
  function may(ability: Ability): boolean {
    return role.value !== null && can(role.value, ability)
  }

  return { me, role, may }
}
