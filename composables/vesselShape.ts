import type { VesselKind } from '#shared/cellar/vessel'
import { vesselForm } from '#shared/cellar/vesselForm'

/** Pixels a metre of the cellar's drawing, unless a vessel is too large for it. */
export const PIXELS_A_METRE = 92
const TALLEST = 380
const WIDEST = 560

/** Room at each side for hoops and lid, above for the bung, below for what the vessel stands on. */
const SIDE = 8
const HEAD = 14
const STAND = 10

export interface Rectangle { x: number, y: number, width: number, height: number }

export interface VesselShape {
  width: number
  height: number
  /** The wall, closed. What is inside is clipped by it. */
  outline: string
  /** Where the inside lies, for what is drawn into it. */
  inside: Rectangle
  /** Thin parts: bung, legs, chocks, beams. */
  fittings: string
  /** Thick parts beside the wall: the lid of a vat. */
  lid: string
  hoops: readonly Rectangle[]
  /** Whether the wall is drawn as wood. */
  wood: boolean
}

type Body = Rectangle & { middle: number, foot: number, floor: number }

/** The scale in which all of these stand on one floor. */
export function commonScale(vessels: readonly { kind: VesselKind, workingLitres: number }[]): number {
  return Math.min(PIXELS_A_METRE, ...vessels.map(({ kind, workingLitres }) => {
    const { widthMetres, heightMetres } = vesselForm(kind, workingLitres)
    return Math.min(TALLEST / heightMetres, WIDEST / widthMetres)
  }))
}

/** How a vessel is drawn, in pixels of a common scale. Its floor is the lower edge. */
export function vesselShape(kind: VesselKind, workingLitres: number, wood: boolean, scale = PIXELS_A_METRE): VesselShape {
  const form = vesselForm(kind, workingLitres)
  const width = form.widthMetres * scale
  const height = form.heightMetres * scale
  const body: Body = { x: SIDE, y: HEAD, width, height, middle: SIDE + width / 2, foot: HEAD + height, floor: HEAD + height + STAND }
  const drawn = form.stance === 'tapered' ? tapered(body) : form.stance === 'lying' ? lying(body, wood) : domed(body, kind)
  return {
    width: rounded(width + 2 * SIDE),
    height: rounded(body.floor),
    inside: { x: SIDE, y: HEAD, width: rounded(width), height: rounded(height) },
    lid: '',
    hoops: [],
    wood,
    ...drawn,
  }
}

type Drawn = Pick<VesselShape, 'outline' | 'fittings'> & Partial<VesselShape>

function tapered({ x, y, width, middle, foot, floor, height }: Body): Drawn {
  const slope = width * 0.05
  const right = x + width
  const hoops = [0.1, 0.32, 0.62, 0.88].flatMap((down) => {
    const inset = slope * (1 - down)
    return [x + inset - 6, right - inset + 1].map(left => rectangle(left, y + height * down - 3, 5, 6))
  })
  return {
    outline: path`M${x} ${foot} L${x + slope} ${y} H${right - slope} L${right} ${foot} Z`,
    lid: path`M${x + slope - 5} ${y} H${right - slope + 5}`,
    fittings: path`M${middle - 5} ${y - 2} V${y - 8} H${middle + 5} V${y - 2} M${x - 4} ${foot + 4} H${right + 4} M${x + width * 0.12} ${foot + 4} V${floor} M${right - width * 0.12} ${foot + 4} V${floor}`,
    hoops,
  }
}

function lying({ x, y, width, height, middle, foot, floor }: Body, wood: boolean): Drawn {
  const bulge = height * 0.1
  const right = x + width
  const hoops = !wood
    ? []
    : [0.21, 0.37, 0.63, 0.79].flatMap((along) => {
        const sag = bulge * (1 - 4 * along * (1 - along)) * 2
        const left = x + width * along - 2.5
        return [rectangle(left, y + sag - 5, 5, 4), rectangle(left, foot - sag + 1, 5, 4)]
      })
  const chock = width * 0.2
  return {
    outline: path`M${x} ${y + 2 * bulge} Q${middle} ${y - 2 * bulge} ${right} ${y + 2 * bulge} V${foot - 2 * bulge} Q${middle} ${foot + 2 * bulge} ${x} ${foot - 2 * bulge} Z`,
    fittings: path`M${middle - 5} ${y - 2} V${y - 5} H${middle + 5} V${y - 2} M${x + chock - 3} ${floor} L${x + chock} ${floor - 4} h10 M${right - chock + 3} ${floor} L${right - chock} ${floor - 4} h-10`,
    hoops,
  }
}

function domed(body: Body, kind: VesselKind): Drawn {
  const { x, y, width, middle, foot, floor } = body
  const right = x + width
  const dish = width * 0.13
  if (kind === 'glassCarboy' || kind === 'plasticCarboy') return carboy(body)
  const bung = path`M${middle - 4.5} ${y - 1} V${y - 10} H${middle + 4.5} V${y - 1}`
  if (kind === 'keg') {
    return {
      outline: path`M${x} ${y + dish} Q${middle} ${y - dish} ${right} ${y + dish} V${floor - 2 - dish / 2} L${right - dish / 2} ${floor - 2} H${x + dish / 2} L${x} ${floor - 2 - dish / 2} Z`,
      fittings: bung,
    }
  }
  const legTop = foot - dish * 0.45
  return {
    outline: path`M${x} ${y + dish} Q${middle} ${y - dish} ${right} ${y + dish} V${foot - dish} Q${middle} ${foot + dish} ${x} ${foot - dish} Z`,
    fittings: path`${bung} M${x + width * 0.14} ${legTop} V${floor} M${right - width * 0.14} ${legTop} V${floor}`,
  }
}

function carboy({ x, y, width, middle, floor, height }: Body): Drawn {
  const right = x + width
  const shoulder = y + height * 0.36
  const neck = width * 0.13
  const foot = floor - 2
  const round = Math.min(6, width * 0.12)
  return {
    outline: path`M${x + round} ${foot} Q${x} ${foot} ${x} ${foot - round} V${shoulder} C${x} ${y + height * 0.1} ${middle - neck} ${y + height * 0.2} ${middle - neck} ${y} H${middle + neck} C${middle + neck} ${y + height * 0.2} ${right} ${y + height * 0.1} ${right} ${shoulder} V${foot - round} Q${right} ${foot} ${right - round} ${foot} Z`,
    fittings: path`M${middle - neck - 2} ${y - 1} V${y - 5} H${middle + neck + 2} V${y - 1}`,
  }
}

/** A path whose numbers are cut to a tenth of a pixel, so that both sides write the same. */
function path(words: TemplateStringsArray, ...numbers: (number | string)[]): string {
  return String.raw({ raw: words }, ...numbers.map(number => typeof number === 'number' ? rounded(number) : number))
}

function rectangle(x: number, y: number, width: number, height: number): Rectangle {
  return { x: rounded(x), y: rounded(y), width, height }
}

function rounded(number: number): number {
  return Math.round(number * 10) / 10
}

/** The size of a vessel in metres. */
export function vesselSize(kind: VesselKind, workingLitres: number): { widthMetres: number, heightMetres: number } {
  return vesselForm(kind, workingLitres)
}
