import { createServer } from 'node:net'
import { join } from 'node:path'
import { writeWhole } from './files'

/** A port that nobody listens on. */
export async function freePort(): Promise<number> {
  return listenOnce(0, '127.0.0.1')
}

/** Whether a server of ours could listen there. */
export async function isPortFree(port: number, host: string): Promise<boolean> {
  try {
    await listenOnce(port, host)
    return true
  }
  catch (error) {
    if (error instanceof Error && 'code' in error && error.code === 'EADDRINUSE') return false
    throw error
  }
}

/** Where everything of this start listens, for people and programs that want to look. */
export type Ports = Record<string, number>

export function writePorts(dataFolder: string, ports: Ports): void {
  writeWhole(portsFile(dataFolder), `${JSON.stringify(ports, null, 2)}\n`, 0o644)
}

export function portsFile(dataFolder: string): string {
  return join(dataFolder, 'ports.json')
}

async function listenOnce(port: number, host: string): Promise<number> {
  return new Promise((resolve, reject) => {
    const server = createServer()
    server.on('error', reject)
    server.listen({ port, host }, () => {
      const address = server.address()
      server.close(() => {
        if (address !== null && typeof address === 'object') resolve(address.port)
        else reject(new Error('listening gave no port'))
      })
    })
  })
}
