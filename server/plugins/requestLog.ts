import { v7 as newId } from 'uuid'
import { setResponseHeader } from 'h3'

/** One line a request: its id, the route's pattern (never the address itself, which may hold a secret), status and time. */
export default defineNitroPlugin((nitro) => {
  const log = useLog()

  nitro.hooks.hook('request', (event) => {
    const requestId = newId()
    const startedAt = performance.now()
    event.context.requestId = requestId
    setResponseHeader(event, 'x-request-id', requestId)
    // A page asks the API while it is drawn: those calls are part of the page's own line.
    if ('__unenv__' in event.node.req) return
    event.node.res.once('close', () => log.info({
      requestId,
      method: event.method,
      route: event.context.matchedRoute?.path ?? 'file',
      status: event.node.res.statusCode,
      ms: Math.round((performance.now() - startedAt) * 10) / 10,
      ...(!event.node.res.writableFinished && { brokenOff: true }),
    }, 'request'))
  })
})
