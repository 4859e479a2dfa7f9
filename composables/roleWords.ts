import type { Role } from '#shared/abilities'

/** What each role is called. */
export const ROLE_WORDS: Record<Role, string> = {
  owner: 'owner',
  headBrewer: 'head brewer',
  cellarLead: 'cellar lead',
  cellarHand: 'cellar hand',
  packager: 'packager',
  taster: 'taster',
  auditor: 'auditor',
}
