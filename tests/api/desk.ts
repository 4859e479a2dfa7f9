import { v7 as newId } from 'uuid'
import type { StackView } from '../../shared/schemas/stack'
import type { VesselView } from '../../shared/schemas/vessel'
import { startServer, type TestServer } from '../support/server'
import { signedIn, type Reply, type Visitor } from '../support/visitor'

/** A server with the demo in it, two of its crew, and what a test of the ledger asks for again and again. */
export interface Desk {
  server: TestServer
  owner: Visitor
  hand: Visitor
  /** The demo's vessels by name. */
  vessels: Map<string, VesselView>
  idOf(vessel: string): string
  stackOf(vesselId: string, on?: string): Promise<StackView>
  /** A vessel of its own, filled by one act. */
  aVessel(litres?: number, brewedOn?: string, on?: string): Promise<string>
}

export async function openDesk(): Promise<Desk> {
  const server = await startServer()
  const owner = await signedIn(server.origin, 'owner@sallowmere.example')
  const hand = await signedIn(server.origin, 'hand@sallowmere.example')
  const vessels = new Map(read<VesselView[]>(await owner.get('/api/vessels')).map(vessel => [vessel.name, vessel]))
  return {
    server,
    owner,
    hand,
    vessels,
    idOf: name => vessels.get(name)?.id ?? '',
    stackOf: async (id, on) => read<StackView>(await owner.get(`/api/vessels/${id}/stack${on ? `?on=${on}` : ''}`)),
    async aVessel(litres = 1000, brewedOn = '2026-01-05', on = '2026-02-02') {
      const id = newId()
      await owner.post('/api/vessels', { id, name: `Own ${id}`, kind: 'steel', workingLitres: 2000 })
      if (litres > 0) await owner.post('/api/acts', { id: newId(), movements: [fill(id, litres, brewedOn, on)] })
      return id
    },
  }
}

/** The body of an answer, as its schema has it. */
export function read<Body>(reply: Reply): Body {
  return reply.json as Body
}

export function fill(vesselId: string, litres: number, brewedOn: string, occurredOn: string) {
  return { id: newId(), kind: 'in', vesselId, litres, occurredOn, brew: { code: `T${newId()}`.slice(0, 40), brewedOn } }
}

export function draw(vesselId: string, litres: number, occurredOn = '2026-09-07') {
  return { id: newId(), kind: 'draw', vesselId, litres, occurredOn }
}
