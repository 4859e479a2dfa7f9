/** The roles of a crew, from most to least. */
export const ROLES = ['owner', 'headBrewer', 'cellarLead', 'cellarHand', 'packager', 'taster', 'auditor'] as const
export type Role = (typeof ROLES)[number]

const readers: readonly Role[] = ['owner', 'headBrewer', 'cellarLead', 'cellarHand', 'packager', 'auditor']
const workers: readonly Role[] = ['owner', 'headBrewer', 'cellarLead', 'cellarHand', 'packager']
const leads: readonly Role[] = ['owner', 'headBrewer', 'cellarLead']
const brewers: readonly Role[] = ['owner', 'headBrewer']

/**
 * Which role may do what: the one table, asked by a route before it does anything and by a page before it shows a button.
 * Rules that depend on a row (one's *own* duty) take this answer and add to it where the row is known.
 */
const TABLE = {
  /** Cellar, vessels, ledger, calendar. */
  readCellar: readers,
  completeOwnDuty: [...workers, 'taster'],
  completeUnassignedDuty: workers,
  completeAnyDuty: leads,
  record: workers,
  steerDuties: leads,
  handBackDuty: [...leads, 'cellarHand', 'packager'],
  reverse: leads,
  importLedger: leads,
  exportLedger: [...leads, 'auditor'],
  editVessels: leads,
  plan: brewers,
  signVerdict: ['headBrewer'],
  signQuarter: ['owner'],
  runBrewery: ['owner'],
  invite: leads,
} as const satisfies Record<string, readonly Role[]>

export type Ability = keyof typeof TABLE
export const ABILITIES: readonly Ability[] = Object.keys(TABLE).filter(isAbility)

/** Whether `role` may do `ability`. */
export function can(role: Role, ability: Ability): boolean {
  const allowed: readonly Role[] = TABLE[ability]
  return allowed.includes(role)
}

/**
 * The roles that `role` may invite: an owner any, the others up to their own rank, counted along `ROLES` from the right.
 * Empty for a role that may not invite.
 */
export function invitable(role: Role): readonly Role[] {
  return can(role, 'invite') ? ROLES.slice(ROLES.indexOf(role)) : []
}

function isAbility(name: string): name is Ability {
  return name in TABLE
}
