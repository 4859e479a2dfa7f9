import autocannon from 'autocannon'

export interface Contender {
  url: string
  headers?: Record<string, string>
}

export interface Ratio {
  median: number
  lowest: number
  highest: number
}

/**
 * Requests per second of `ours` against a floor, measured in turns so that a noisy machine treats both alike.
 * Throws if an answer was not a 200, for a fast failure is no speed.
 */
export async function ratioOf(ours: Contender, floor: Contender, { rounds = 7, seconds = 3, connections = 16 } = {}): Promise<Ratio> {
  await load(ours, 2, connections)
  await load(floor, 2, connections)
  const ratios: number[] = []
  for (let round = 0; round < rounds; round++) {
    const first = round % 2 === 0
    const a = await load(first ? ours : floor, seconds, connections)
    const b = await load(first ? floor : ours, seconds, connections)
    ratios.push(first ? a / b : b / a)
  }
  ratios.sort((a, b) => a - b)
  return { median: ratios[Math.floor(ratios.length / 2)] ?? NaN, lowest: ratios[0] ?? NaN, highest: ratios.at(-1) ?? NaN }
}

async function load({ url, headers = {} }: Contender, duration: number, connections: number): Promise<number> {
  const result = await autocannon({ url, headers, connections, duration })
  if (result.non2xx > 0 || result.errors > 0) throw new Error(`${url}: ${result.non2xx} answers were no success, ${result.errors} failed`)
  return result.requests.average
}
