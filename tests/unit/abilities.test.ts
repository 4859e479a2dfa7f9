import { expect, it } from 'vitest'
import { ABILITIES, can, invitable, ROLES } from '../../shared/abilities'

/** The table of roles as it was agreed: o owner, b head brewer, l cellar lead, h cellar hand, p packager, t taster, a auditor. */
const AGREED: Record<string, string> = {
  readCellar: 'oblhpa',
  completeOwnDuty: 'oblhpt',
  completeUnassignedDuty: 'oblhp',
  completeAnyDuty: 'obl',
  record: 'oblhp',
  steerDuties: 'obl',
  handBackDuty: 'oblhp',
  reverse: 'obl',
  importLedger: 'obl',
  exportLedger: 'obla',
  editVessels: 'obl',
  plan: 'ob',
  signVerdict: 'b',
  signQuarter: 'o',
  runBrewery: 'o',
  invite: 'obl',
}
const LETTERS = 'oblhpta'

it('names every ability in the agreed table', () => {
  expect([...ABILITIES].sort()).toEqual(Object.keys(AGREED).sort())
})

it.each(ABILITIES)('%s: for just the agreed roles', (ability) => {
  const allowed = ROLES.filter(role => can(role, ability)).map(role => LETTERS[ROLES.indexOf(role)]).join('')
  expect(allowed).toBe(AGREED[ability])
})

it('lets an owner invite anybody, others up to their own rank, and the rest nobody', () => {
  expect(invitable('owner')).toEqual(ROLES)
  expect(invitable('headBrewer')).toEqual(['headBrewer', 'cellarLead', 'cellarHand', 'packager', 'taster', 'auditor'])
  expect(invitable('cellarLead')).toEqual(['cellarLead', 'cellarHand', 'packager', 'taster', 'auditor'])
  for (const role of ['cellarHand', 'packager', 'taster', 'auditor'] as const) expect(invitable(role)).toEqual([])
})
