import Fraction from 'fraction.js'
import type { LedgerLine } from '../../shared/cellar/movement'

/** A vessel as a cohort ledger in exact fractions: litres by brew. */
export type ExactVessel = Map<string, Fraction>

/**
 * A second reading of the ledger, as plain as can be: every cohort is multiplied out at every line, in exact fractions.
 * Slow, and right by being simple.
 */
export class ExactCellar {
  readonly vessels = new Map<string, ExactVessel>()

  vessel(id: string): ExactVessel {
    let vessel = this.vessels.get(id)
    if (!vessel) this.vessels.set(id, vessel = new Map())
    return vessel
  }

  litres(id: string): Fraction {
    return [...this.vessel(id).values()].reduce((sum, litres) => sum.add(litres), new Fraction(0))
  }

  apply(line: LedgerLine): void {
    const vessel = this.vessel(line.vesselId)
    if (line.kind === 'in' || line.kind === 'addition') {
      add(vessel, line.brewId ?? 'no beer', exact(line.litres))
      return
    }
    const had = this.litres(line.vesselId)
    const taken = exact(line.litres).compare(had) > 0 ? had : exact(line.litres)
    const out = new Map<string, Fraction>()
    for (const [brew, litres] of vessel) {
      const part = litres.mul(taken).div(had)
      out.set(brew, part)
      vessel.set(brew, litres.sub(part))
    }
    if (taken.equals(had)) vessel.clear()
    if (line.kind !== 'move') return
    const arriving = taken.sub(exact(line.lossLitres ?? 0))
    for (const [brew, part] of out) add(this.vessel(line.toVesselId ?? ''), brew, part.mul(arriving).div(taken))
  }
}

function add(vessel: ExactVessel, brew: string, litres: Fraction): void {
  vessel.set(brew, (vessel.get(brew) ?? new Fraction(0)).add(litres))
}

function exact(litres: number): Fraction {
  return new Fraction(Math.round(litres * 1000), 1000)
}
