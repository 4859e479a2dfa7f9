import { DEMO_PASSWORD } from '../../dev/loadDemo'

export interface Reply {
  status: number
  headers: Headers
  text: string
  /** The parsed body; undefined if it is not JSON. */
  json: unknown
}

export interface Visitor {
  cookie: string | undefined
  request(method: string, path: string, options?: { body?: unknown, headers?: Record<string, string> }): Promise<Reply>
  get(path: string, headers?: Record<string, string>): Promise<Reply>
  post(path: string, body?: unknown): Promise<Reply>
  patch(path: string, body: unknown): Promise<Reply>
  delete(path: string): Promise<Reply>
}

/** A browser that asks nothing but what it is told to: it keeps its cookie and says where its requests come from. */
export function visitor(origin: string, cookie?: string): Visitor {
  const self: Visitor = {
    cookie,
    async request(method, path, { body, headers = {} } = {}) {
      const response = await fetch(origin.replace('localhost', '127.0.0.1') + path, {
        method,
        redirect: 'manual',
        headers: {
          ...(method !== 'GET' && method !== 'HEAD' && { 'sec-fetch-site': 'same-origin' }),
          ...(body !== undefined && { 'content-type': 'application/json' }),
          ...(self.cookie !== undefined && { cookie: self.cookie }),
          ...headers,
        },
        ...(body !== undefined && { body: typeof body === 'string' ? body : JSON.stringify(body) }),
      })
      const [given] = response.headers.getSetCookie()
      if (given !== undefined) {
        const [pair = ''] = given.split(';')
        self.cookie = pair.endsWith('=') ? undefined : pair
      }
      const text = await response.text()
      return { status: response.status, headers: response.headers, text, json: parsed(text) }
    },
    get: (path, headers) => self.request('GET', path, { headers }),
    post: (path, body = {}) => self.request('POST', path, { body }),
    patch: (path, body) => self.request('PATCH', path, { body }),
    delete: path => self.request('DELETE', path),
  }
  return self
}

/** A visitor who has signed in. */
export async function signedIn(origin: string, email: string, password = DEMO_PASSWORD): Promise<Visitor> {
  const someone = visitor(origin)
  const reply = await someone.post('/api/auth/sign-in', { email, password })
  if (reply.status !== 200) throw new Error(`${email} could not sign in: ${reply.status} ${reply.text}`)
  return someone
}

function parsed(text: string): unknown {
  try {
    return JSON.parse(text)
  }
  catch {
    return undefined
  }
}
