const DAY = /^[12]\d{3}-(?:0[1-9]|1[0-2])-(?:0[1-9]|[12]\d|3[01])$/

/** The day that a page looks back to: it stands in the address as `?on=`, and is today if it does not. */
export function useLookBack() {
  const { me } = useMe()
  const route = useRoute()
  const today = computed(() => me.value?.brewery?.today ?? '1970-01-01')
  /** Null for today, so that nothing is asked twice at midnight. */
  const on = computed(() => {
    const asked = route.query.on
    return typeof asked === 'string' && DAY.test(asked) && asked !== today.value ? asked : null
  })
  const day = computed(() => on.value ?? today.value)

  async function look(asked: string): Promise<void> {
    await navigateTo({ path: route.path, query: asked === today.value ? {} : { on: asked } })
  }

  return { on, day, today, look }
}
