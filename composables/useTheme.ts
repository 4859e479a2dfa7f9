/** How a person wants the walls: as the device has it, by day or by night. */
export const THEMES = ['device', 'day', 'night'] as const
export type Theme = (typeof THEMES)[number]

const A_YEAR = 60 * 60 * 24 * 365

/** The theme, kept in a cookie so that the server already renders in it. */
export function useTheme() {
  const cookie = useCookie('undercroft-theme', { maxAge: A_YEAR, sameSite: 'lax', path: '/' })
  const theme = computed<Theme>({
    get: () => THEMES.find(name => name !== 'device' && name === cookie.value) ?? 'device',
    set: (chosen) => {
      cookie.value = chosen === 'device' ? null : chosen
    },
  })
  const htmlClass = computed(() => theme.value === 'device' ? '' : theme.value)
  return { theme, htmlClass }
}
