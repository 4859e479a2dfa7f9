import { visitor } from '../support/visitor'

const PEOPLE = ['owner', 'brewer', 'lead', 'hand', 'packaging']
const ROUNDS = 4

/** How long a wrong sign-in takes for an address that nobody has, against one that somebody has: medians of calls made in turns. */
export async function benchSignIn(origin: string): Promise<number> {
  const unknown: number[] = []
  const known: number[] = []
  // Ten failures on one account are let through, fifty from one address: few enough tries of each.
  for (let round = 0; round < ROUNDS; round++) {
    for (const name of PEOPLE) {
      known.push(await timed(origin, `${name}@sallowmere.example`))
      unknown.push(await timed(origin, `${name}@nowhere.example`))
    }
  }
  return median(unknown) / median(known)
}

async function timed(origin: string, email: string): Promise<number> {
  const started = performance.now()
  const { status } = await visitor(origin).post('/api/auth/sign-in', { email, password: 'not the right one' })
  if (status !== 401) throw new Error(`a wrong sign-in was answered ${status}`)
  return performance.now() - started
}

function median(values: number[]): number {
  return [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)] ?? NaN
}
