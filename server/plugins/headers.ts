import { randomBytes } from 'node:crypto'
import { removeResponseHeader, setResponseHeaders } from 'h3'

/**
 * What every answer says to the browser. Set before anything else runs, so that files, errors and pages all carry it;
 * a file of the build says its own cache-control afterwards.
 */
export default defineNitroPlugin((nitro) => {
  const { secure } = settings()

  nitro.hooks.hook('request', (event) => {
    const nonce = randomBytes(16).toString('base64')
    event.context.nonce = nonce
    setResponseHeaders(event, {
      'content-security-policy': policy(nonce),
      'x-content-type-options': 'nosniff',
      'x-frame-options': 'DENY',
      'referrer-policy': 'same-origin',
      'cross-origin-opener-policy': 'same-origin',
      'cross-origin-resource-policy': 'same-origin',
      'permissions-policy': 'camera=(self), geolocation=(), microphone=(), payment=(), usb=()',
      'cache-control': 'no-store',
      ...(secure && { 'strict-transport-security': 'max-age=63072000; includeSubDomains' }),
    })
  })

  nitro.hooks.hook('render:html', (html, { event }) => {
    const { nonce } = event.context
    const marked = (part: string) => part.replace(/<(script|style|link)(?=[\s>])/g, `<$1 nonce="${nonce}"`)
    html.head = [...html.head.map(marked), `<meta name="csp-nonce" content="${nonce}">`]
    html.bodyPrepend = html.bodyPrepend.map(marked)
    html.bodyAppend = html.bodyAppend.map(marked)
  })

  nitro.hooks.hook('render:response', (response) => {
    delete response.headers?.['x-powered-by']
  })

  nitro.hooks.hook('beforeResponse', event => removeResponseHeader(event, 'x-powered-by'))
})

function policy(nonce: string): string {
  return [
    `default-src 'none'`,
    `script-src 'self' 'nonce-${nonce}'`,
    `style-src 'self' 'nonce-${nonce}'`,
    // Drawings and the calendar place things by style attributes, also when drawn on the server.
    `style-src-attr 'unsafe-inline'`,
    `img-src 'self' blob: data:`,
    `font-src 'self'`,
    `connect-src 'self'`,
    `manifest-src 'self'`,
    `worker-src 'self'`,
    `form-action 'self'`,
    `base-uri 'none'`,
    `object-src 'none'`,
    `frame-ancestors 'none'`,
  ].join('; ')
}
