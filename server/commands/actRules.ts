import type { ActInput, BrewRef, MovementInput } from '#shared/schemas/ledger'
import { Fault } from '#shared/types/fault'
import type { FieldFault } from '#shared/types/problem'
import type { CellarState } from './cellarState'

/** Refuse an act with a word at each field that cannot be: what no schema sees, because it depends on the cellar or on another field. */
export function requireSound(input: ActInput, state: CellarState, beerCodes: readonly string[], today: string): void {
  const vessels = new Set(state.vessels.map(vessel => vessel.id))
  const codes = new Map([...state.brews.values()].map(brew => [brew.code, brew.brewedOn]))
  const beers = new Set(beerCodes)
  const ids = new Set<string>()
  const faults = input.movements.flatMap((movement, at) => {
    const found = faultsOf(movement, { vessels, codes, beers, state, today })
    if (ids.has(movement.id)) found.push({ field: 'id', message: 'Another movement of this act has this id.' })
    ids.add(movement.id)
    return found.map(({ field, message }) => ({ field: `movements.${at}.${field}`, message }))
  })
  // There are neither draws nor duties yet that an act could make or do.
  if (input.drawId) faults.push({ field: 'drawId', message: 'There is no such draw.' })
  if (input.dutyId) faults.push({ field: 'dutyId', message: 'There is no such duty.' })
  if (faults.length > 0) throw new Fault('invalid', 'Something in this act cannot be.', { errors: faults })
}

interface Around {
  vessels: ReadonlySet<string>
  /** The brew day of each code, those named earlier in the same act among them. */
  codes: Map<string, string>
  beers: ReadonlySet<string>
  state: CellarState
  today: string
}

function faultsOf(movement: MovementInput, around: Around): FieldFault[] {
  const faults: FieldFault[] = []
  const say = (field: string, message: string) => void faults.push({ field, message })
  if (!around.vessels.has(movement.vesselId)) say('vesselId', 'There is no such vessel.')
  if (movement.occurredOn > around.today) say('occurredOn', 'This day has not come yet.')
  if (movement.kind === 'move') {
    if (!around.vessels.has(movement.toVesselId)) say('toVesselId', 'There is no such vessel.')
    if (movement.toVesselId === movement.vesselId) say('toVesselId', 'Beer cannot be moved into the vessel that it is in.')
    if ((movement.lossLitres ?? 0) > movement.litres) say('lossLitres', 'More is lost on the way than leaves the vessel.')
  }
  if (movement.kind === 'in') {
    const fault = brewFault(movement.brew, movement.occurredOn, around)
    if (fault) say(fault.field, fault.message)
  }
  return faults
}

function brewFault(brew: BrewRef, rackedOn: string, { codes, beers, state }: Around): FieldFault | null {
  if ('id' in brew) {
    const known = state.brews.get(brew.id)
    if (!known) return { field: 'brew.id', message: 'There is no such brew.' }
    return known.brewedOn > rackedOn ? { field: 'brew.id', message: `It cannot be racked before it was brewed, on ${known.brewedOn}.` } : null
  }
  const known = codes.get(brew.code)
  if (known !== undefined && known !== brew.brewedOn) return { field: 'brew.brewedOn', message: `Brew ${brew.code} was brewed on ${known}. One code has one brew day.` }
  if (brew.beerCode !== undefined && !beers.has(brew.beerCode)) return { field: 'brew.beerCode', message: `No beer here has the code ${brew.beerCode}.` }
  codes.set(brew.code, brew.brewedOn)
  return brew.brewedOn > rackedOn ? { field: 'brew.brewedOn', message: 'It cannot be racked before it was brewed.' } : null
}
