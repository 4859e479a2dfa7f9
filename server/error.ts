import { getRequestHeader, send, setResponseHeader, type H3Error, type H3Event } from 'h3'
import { faultOf, problemOf, writeProblem } from './utils/problem'
import { useLog } from './utils/log'
import { endProgress } from './utils/progress'

/**
 * Every error of the server ends here. A page is drawn by the framework's own handler, which comes after this one, and is
 * handed nothing but the status and our own words; everybody else gets a problem.
 */
export default async function (error: H3Error, event: H3Event): Promise<void> {
  const fault = faultOf(error)
  if (!event.node.res.headersSent) setResponseHeader(event, 'cache-control', 'no-store')
  if (fault.code === 'failed' && !event.path.startsWith('/__nuxt_error')) {
    useLog().error({ err: error.cause instanceof Error ? error.cause : error, requestId: event.context.requestId }, 'a request failed')
  }
  if (endProgress(event, problemOf(error))) return
  if (!wantsPage(event)) {
    await send(event, writeProblem(event, error))
    return
  }
  const { status, title } = problemOf(error)
  error.statusCode = status
  error.statusMessage = title
  error.message = title
  error.data = undefined
  error.cause = undefined
  Object.defineProperty(error, 'stack', { value: '' })
  error.unhandled = false
  error.fatal = false
}

function wantsPage(event: H3Event): boolean {
  return !event.path.startsWith('/api/') && (getRequestHeader(event, 'accept') ?? '').includes('text/html')
}
