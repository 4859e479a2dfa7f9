/** The same address for another database of the cluster. */
export function onDatabase(address: string, name: string): string {
  const url = new URL(address)
  url.pathname = `/${name}`
  return url.href
}
