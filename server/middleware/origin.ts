import { defineEventHandler, getRequestHeader, type H3Event } from 'h3'
import { Fault } from '#shared/types/fault'

const READING = new Set(['GET', 'HEAD'])
const WRITING = new Set(['POST', 'PUT', 'PATCH', 'DELETE'])

/**
 * A change comes from our own pages, or from a program that says so: by method, never by path, so that no spelling of an
 * address goes round it. This is what keeps another site from writing with a signed-in browser; that a change is JSON,
 * or the file that its route takes, is seen to where the body is read.
 */
export default defineEventHandler((event) => {
  const { method } = event
  if (READING.has(method)) return
  if (!WRITING.has(method)) throw new Fault('methodNotAllowed', 'This method is not known here.')
  if (!fromHere(event)) throw new Fault('foreignOrigin', 'Changes are taken from Undercroft’s own pages only.')
})

function fromHere(event: H3Event): boolean {
  const site = getRequestHeader(event, 'sec-fetch-site')
  const origin = getRequestHeader(event, 'origin')
  if (site !== undefined && site !== 'same-origin') return false
  if (origin !== undefined) return ownOrigins().has(origin)
  return site === 'same-origin'
}

let own: Set<string> | undefined

/** The address we are reached at, and where that is this machine, its other name. */
function ownOrigins(): Set<string> {
  if (!own) {
    const { origin } = settings()
    own = new Set([origin, origin.replace('//localhost', '//127.0.0.1'), origin.replace('//127.0.0.1', '//localhost')])
  }
  return own
}
