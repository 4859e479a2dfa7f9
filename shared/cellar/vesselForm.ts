import type { VesselKind } from './vessel'

export interface VesselForm {
  /** How it stands: upright with a taper, upright with a domed head, or lying on its side. */
  stance: 'tapered' | 'domed' | 'lying'
  /** Outer size as seen from the front, in metres. */
  widthMetres: number
  heightMetres: number
}

/** Width ÷ height as seen from the front, and the stance, by kind. Common practice, no source. */
const PROPORTION: Record<VesselKind, { stance: VesselForm['stance'], widthOverHeight: number }> = {
  vat: { stance: 'tapered', widthOverHeight: 0.84 },
  puncheon: { stance: 'lying', widthOverHeight: 1.1 },
  barrel: { stance: 'lying', widthOverHeight: 1.28 },
  steel: { stance: 'domed', widthOverHeight: 0.72 },
  keg: { stance: 'domed', widthOverHeight: 0.62 },
  glassCarboy: { stance: 'domed', widthOverHeight: 0.7 },
  plasticCarboy: { stance: 'domed', widthOverHeight: 0.7 },
}

/**
 * The size of a vessel as it is drawn: a body of revolution that holds `workingLitres` in the proportion of its kind,
 * so that all vessels of a cellar can stand on one floor in one scale.
 *
 * @param workingLitres litres, above nought
 * @returns metres
 */
export function vesselForm(kind: VesselKind, workingLitres: number): VesselForm {
  const { stance, widthOverHeight } = PROPORTION[kind]
  const cubicMetres = workingLitres / 1000
  if (stance === 'lying') {
    // A lying cask: its height is the belly's diameter, its width the length of the staves.
    const heightMetres = Math.cbrt(cubicMetres * 4 / (Math.PI * widthOverHeight))
    return { stance, widthMetres: heightMetres * widthOverHeight, heightMetres }
  }
  const heightMetres = Math.cbrt(cubicMetres * 4 / (Math.PI * widthOverHeight ** 2))
  return { stance, widthMetres: heightMetres * widthOverHeight, heightMetres }
}
