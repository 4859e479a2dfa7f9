// A backslash is a slash to a browser, and a control character is dropped from an address before it is read.
const FORBIDDEN = /[\\\s\p{Cc}]/u
const NOWHERE = 'http://cellar.invalid'

/**
 * The path to go to after signing in, if it is one of our own; otherwise null. Judged as a browser would read it, and once
 * more with its percent signs decoded, so that nothing between here and there can turn it into another host.
 */
export function nextPath(asked: unknown): string | null {
  if (typeof asked !== 'string' || !isOurs(asked)) return null
  let decoded: string
  try {
    decoded = decodeURIComponent(asked)
  }
  catch {
    return null
  }
  return isOurs(decoded.replaceAll(' ', '+')) ? asked : null
}

function isOurs(path: string): boolean {
  if (!path.startsWith('/') || path.includes('//') || FORBIDDEN.test(path)) return false
  try {
    return new URL(path, NOWHERE).origin === NOWHERE
  }
  catch {
    return false
  }
}
