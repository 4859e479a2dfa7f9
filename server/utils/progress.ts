import { getRequestHeader, setResponseHeader, setResponseStatus, type H3Event } from 'h3'

const LINES_OF_JSON = 'application/x-ndjson'

/**
 * Tell whoever waits how far a long work has come: one line of JSON a step, and the answer, or the problem, as the last.
 * Does nothing for a client that did not ask for it.
 */
export function progressTo(event: H3Event): (line: number) => void {
  if (getRequestHeader(event, 'accept') !== LINES_OF_JSON) return () => {}
  return (line) => {
    if (!event.node.res.headersSent) {
      setResponseStatus(event, 200)
      setResponseHeader(event, 'content-type', LINES_OF_JSON)
    }
    event.node.res.write(`${JSON.stringify({ line })}\n`)
  }
}

/** Close an answer that has begun with progress. @returns whether there was one */
export function endProgress(event: H3Event, last: unknown): boolean {
  if (!event.node.res.headersSent) return false
  event.node.res.end(`${JSON.stringify(last)}\n`)
  return true
}
