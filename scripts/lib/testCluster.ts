import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { DATABASE, startCluster, type Cluster } from './postgres'

/** How a test run is told of its cluster: addresses with passwords, of which a test changes the database's name. */
export interface TestClusterAddresses {
  port: number
  superuser: string
  owner: string
  app: string
  backup: string
}

/** A cluster in a folder of its own, which is gone with it. Fast, unless a bench wants it to keep its promises to the disk. */
export async function startTestCluster({ within = tmpdir(), durable = false, signal }: { within?: string, durable?: boolean, signal?: AbortSignal } = {}): Promise<{ cluster: Cluster, addresses: TestClusterAddresses, remove: () => Promise<void> }> {
  const dataFolder = mkdtempSync(join(within, 'undercroft-test-'))
  const forget = () => rmSync(dataFolder, { recursive: true, force: true })
  try {
    const cluster = await startCluster({ dataFolder, fast: !durable, signal })
    const { port, urls } = cluster
    return {
      cluster,
      addresses: { port, superuser: urls.superuser('postgres'), owner: urls.owner(DATABASE), app: urls.app(DATABASE), backup: urls.backup(DATABASE) },
      remove: async () => {
        await cluster.stop()
        rmSync(cluster.folder, { recursive: true, force: true })
        forget()
      },
    }
  }
  catch (error) {
    forget()
    throw error
  }
}
