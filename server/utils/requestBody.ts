import { getRequestHeader, setResponseHeader, type H3Event } from 'h3'
import { Fault } from '#shared/types/fault'

/** What a JSON body may weigh, in bytes. */
const JSON_LIMIT = 256 * 1024
/** How long a body may take to come in. */
const PATIENCE_MILLIS = 15_000

/** The JSON of a request, or undefined if it has no body. Throws `tooLarge`, `tooSlow` or `unreadable`. */
export async function readJson(event: H3Event): Promise<unknown> {
  const bytes = await readBytes(event, JSON_LIMIT)
  if (bytes.length === 0) return undefined
  try {
    return JSON.parse(new TextDecoder('utf-8', { fatal: true }).decode(bytes))
  }
  catch {
    throw new Fault('unreadable', 'The body is not JSON that can be read.')
  }
}

async function readBytes(event: H3Event, limit: number): Promise<Buffer> {
  const tooLarge = () => {
    // What is still on its way is not waited for.
    setResponseHeader(event, 'connection', 'close')
    return new Fault('tooLarge', `The body is larger than the ${Math.round(limit / 1024)} kB that are taken here.`)
  }
  if (Number(getRequestHeader(event, 'content-length') ?? 0) > limit) throw tooLarge()
  const { req } = event.node
  const chunks: Buffer[] = []
  let size = 0
  return new Promise((resolve, reject) => {
    const finish = (fault?: Fault) => {
      clearTimeout(patience)
      req.off('data', onData).off('end', onEnd).off('error', onError).off('close', onError)
      req.resume()
      if (fault) reject(fault)
      else resolve(Buffer.concat(chunks))
    }
    const onData = (chunk: Buffer) => {
      size += chunk.length
      if (size > limit) finish(tooLarge())
      else chunks.push(chunk)
    }
    const onEnd = () => finish()
    const onError = () => finish(new Fault('unreadable', 'The body broke off.'))
    const patience = setTimeout(() => {
      setResponseHeader(event, 'connection', 'close')
      finish(new Fault('tooSlow', 'The body took too long to come.'))
    }, PATIENCE_MILLIS)
    req.on('data', onData).on('end', onEnd).on('error', onError).on('close', onError)
  })
}
