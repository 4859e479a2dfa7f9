import type { VesselView } from '#shared/schemas/vessel'
import type { Rectangle } from './vesselShape'

/** All beer of one brew in a vessel, as a drawing needs it. */
export type Layer = NonNullable<VesselView['layers']>[number]

/** How the beers of a brewery are told apart in a drawing, in the order in which they were set up. */
export const HATCHES = ['rising', 'dots', 'waves', 'dashes', 'falling', 'cross', 'upright', 'brick', 'rings', 'chevrons', 'plain'] as const
/** `crosses` is for beer that is none of the brewery's own. */
export type Hatch = (typeof HATCHES)[number] | 'crosses'

export const OLDEST_STEP = 12
/** Up to this step of the ramp lines are drawn dark, from there on light. */
const LAST_PALE_STEP = 6
/** Less than this is told with the older rest. */
export const SMALLEST_SHARE = 0.0001

export interface BeerSign { code: string, name: string, hatch: Hatch }

/** The beers with their hatch. Ids are made in the order of setting up, so a new beer never changes the hatch of another. */
export function beerSigns(beers: readonly { id: string, code: string, name: string }[]): BeerSign[] {
  return [...beers].sort((a, b) => a.id < b.id ? -1 : 1)
    .map(({ code, name }, index) => ({ code, name, hatch: HATCHES[index % HATCHES.length] ?? 'plain' }))
}

/** The tone of a brew, by the year it was brewed in, seen from a day: 1 is this year's. */
export function ageStep(brewedOn: string, day: string): number {
  return Math.min(OLDEST_STEP, Math.max(1, Number(day.slice(0, 4)) - Number(brewedOn.slice(0, 4)) + 1))
}

export const isPale = (step: number) => step <= LAST_PALE_STEP

/** The name of the pattern of one tone and hatch; see `LayerPatterns`. */
export function patternId(step: number, hatch: Hatch): string {
  return `beer-${step}-${hatch}`
}

export interface Band {
  key: string
  d: string
  fill: string
  /** Whether its upper edge is the surface of the beer, or a seam on the pale or the dark half of the ramp. */
  edge: 'surface' | 'pale' | 'deep'
  /** Where it lies, from its upper to its lower edge. */
  top: number
  foot: number
}

interface Picture {
  /** Oldest first. */
  layers: readonly Layer[]
  litres: number
  workingLitres: number
  box: Rectangle
  /** The day on which it is looked at. */
  day: string
  beers: readonly BeerSign[]
  /** Fixed for a vessel, so that its seams never change between visits. */
  seed: string
}

/** The layers as they are painted, newest first: each reaches down to the floor of the vessel, and the older ones are laid over it. */
export function bandsOf({ layers, litres, workingLitres, box, day, beers, seed }: Picture): Band[] {
  const hatches = new Map(beers.map(({ code, hatch }) => [code, hatch]))
  const floor = box.y + box.height
  const filled = Math.min(1, litres / workingLitres) * box.height
  const drawn = withoutCrumbs(layers)
  const wave = waveOf(seed, box)
  let share = 0
  let foot = floor
  return drawn.map((layer, index): Band => {
    share += layer.share
    // A band thinner than a pixel is drawn as one; those above give way.
    const top = Math.min(floor - share * filled, foot - 1)
    const step = ageStep(layer.brewedOn, day)
    const surface = index === drawn.length - 1
    const band: Band = {
      key: layer.brewCode,
      d: `${surface ? `M${tenth(box.x - 4)} ${tenth(top)}H${tenth(box.x + box.width + 4)}` : wave(top, index, foot - top)}V${tenth(floor + 14)}H${tenth(box.x - 4)}Z`,
      fill: `url(#${patternId(step, layer.beerCode === null ? 'crosses' : hatches.get(layer.beerCode) ?? 'crosses')})`,
      edge: surface ? 'surface' : isPale(step) ? 'pale' : 'deep',
      top,
      foot,
    }
    foot = top
    return band
  }).reverse()
}

/** What is too little to be drawn goes into the oldest layer that is not. */
function withoutCrumbs(layers: readonly Layer[]): Layer[] {
  const kept = layers.filter(layer => layer.share >= SMALLEST_SHARE).map(layer => ({ ...layer }))
  const crumbs = layers.filter(layer => layer.share < SMALLEST_SHARE).reduce((sum, layer) => sum + layer.share, 0)
  const [oldest] = kept
  if (oldest) oldest.share += crumbs
  return kept
}

/** The gentle line of a seam: it undulates by a pixel and a half at most, and next ones nearly alike, so that they never cross. */
function waveOf(seed: string, box: Rectangle) {
  const start = numberOf(seed)
  const span = 26 + start % 17
  return (y: number, index: number, thickness: number): string => {
    const high = Math.min(3, 1 + thickness / 6) * ((start + (index >> 2)) % 2 === 0 ? 1 : -1)
    const left = box.x - 4 - ((start % 13) + index * 3) % span
    const count = Math.ceil((box.x + box.width + 4 - left) / span)
    return `M${tenth(left)} ${tenth(y)}q${tenth(span / 2)} ${tenth(-high)} ${span} 0${`t${span} 0`.repeat(count)}`
  }
}

function numberOf(text: string): number {
  let sum = 7
  for (const sign of text) sum = (sum * 31 + sign.charCodeAt(0)) % 9973
  return sum
}

/** Stones of fruit, strewn over the upper third of the beer: one path. */
export function fruitPath(box: Rectangle, litres: number, workingLitres: number): string {
  const filled = Math.min(1, litres / workingLitres) * box.height
  const top = box.y + box.height - filled + 5
  const radius = Math.max(1.6, Math.min(3.2, box.width / 32))
  const across = Math.floor((box.width - 16) / (radius * 3.4))
  const down = Math.max(1, Math.floor(filled / 3 / (radius * 2.4)))
  const stones = Array.from({ length: across * down }, (_, index) => {
    const [row, column] = [Math.floor(index / across), index % across]
    if ((index * 7 + row * 3) % 5 === 0) return ''
    const x = box.x + 10 + column * radius * 3.4 + (row % 2) * radius * 1.6
    const y = top + row * radius * 2.3 + (index * 5 % 3)
    return `M${tenth(x)} ${tenth(y)}a${tenth(radius)} ${tenth(radius)} 0 1 0 .1 0`
  })
  return stones.join('')
}

const tenth = (number: number) => Math.round(number * 10) / 10

/** The tones and hatches that a page needs, each once. */
export function usedPatterns(stacks: readonly (readonly Layer[])[], day: string, beers: readonly BeerSign[]): { step: number, hatch: Hatch }[] {
  const hatches = new Map(beers.map(({ code, hatch }) => [code, hatch]))
  const used = new Map<string, { step: number, hatch: Hatch }>()
  for (const layers of stacks) {
    for (const { brewedOn, beerCode } of layers) {
      const pattern = { step: ageStep(brewedOn, day), hatch: beerCode === null ? 'crosses' as const : hatches.get(beerCode) ?? 'crosses' as const }
      used.set(patternId(pattern.step, pattern.hatch), pattern)
    }
  }
  return [...used.values()]
}
