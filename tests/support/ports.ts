import { once } from 'node:events'
import { createServer } from 'node:net'

/** A port that nobody listened on a moment ago. */
export async function freePort(): Promise<number> {
  const server = createServer().listen(0, '127.0.0.1')
  await once(server, 'listening')
  const address = server.address()
  if (address === null || typeof address === 'string') throw new Error('no port was given')
  server.close()
  await once(server, 'close')
  return address.port
}

/** Wait until something answers at an address, whatever it says. */
export async function answers(url: string): Promise<void> {
  for (let tries = 0; tries < 400; tries++) {
    const status = await fetch(url).then(response => response.status, () => 0)
    if (status !== 0) return
    await new Promise(resolve => setTimeout(resolve, 50))
  }
  throw new Error(`nothing answers at ${url}`)
}
