import { getRequestHeader, setResponseHeader, type H3Event } from 'h3'
import { Fault } from '#shared/types/fault'

/** What a JSON body may weigh, in bytes. */
const JSON_LIMIT = 256 * 1024
/** What a file may weigh that is read as text. */
const TEXT_LIMIT = 32 * 1024 * 1024
/** How long a body may take to come in. */
const PATIENCE_MILLIS = 15_000
/** And a file, which may come over a thin line. */
const TEXT_PATIENCE_MILLIS = 5 * 60_000

/** The JSON of a request, or undefined if it has no body. Throws `tooLarge`, `tooSlow` or `unreadable`. */
export async function readJson(event: H3Event): Promise<unknown> {
  requireType(event, 'application/json')
  const bytes = await readBytes(event, JSON_LIMIT, PATIENCE_MILLIS)
  if (bytes.length === 0) return undefined
  try {
    return JSON.parse(new TextDecoder('utf-8', { fatal: true }).decode(bytes))
  }
  catch {
    throw new Fault('unreadable', 'The body is not JSON that can be read.')
  }
}

/** A file that is text. Throws `unsupportedType`, `tooLarge`, `tooSlow` or `unreadable`. */
export async function readText(event: H3Event, type: string): Promise<string> {
  requireType(event, type)
  const bytes = await readBytes(event, TEXT_LIMIT, TEXT_PATIENCE_MILLIS)
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes)
  }
  catch {
    throw new Fault('unreadable', 'The file is not UTF-8. Save it as CSV UTF-8 and try again.')
  }
}

/** A body is of the kind that its route takes; a form of another site could send none of these without asking first. */
function requireType(event: H3Event, type: string): void {
  const [essence = ''] = (getRequestHeader(event, 'content-type') ?? '').split(';')
  const hasBody = getRequestHeader(event, 'transfer-encoding') !== undefined || Number(getRequestHeader(event, 'content-length') ?? 0) > 0
  if (essence === '' && !hasBody) return
  if (essence.trim().toLowerCase() !== type) throw new Fault('unsupportedType', `Send this as ${type}.`)
}

async function readBytes(event: H3Event, limit: number, patienceMillis: number): Promise<Buffer> {
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
    }, patienceMillis)
    req.on('data', onData).on('end', onEnd).on('error', onError).on('close', onError)
  })
}
