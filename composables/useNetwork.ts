/** Whether the device has a network, and since when it has none. Told apart only in the browser, after the page has come alive. */
export function useNetwork() {
  const lostAt = shallowRef<Date | null>(null)

  function lost(): void {
    lostAt.value ??= new Date()
  }
  function found(): void {
    lostAt.value = null
  }

  onMounted(() => {
    if (!navigator.onLine) lost()
    addEventListener('offline', lost)
    addEventListener('online', found)
  })
  onUnmounted(() => {
    removeEventListener('offline', lost)
    removeEventListener('online', found)
  })

  return { lostAt }
}
