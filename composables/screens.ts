import type { Ability, Role } from '#shared/abilities'
import { can } from '#shared/abilities'

export interface Screen {
  word: string
  path: string
  /** Other paths that belong to it, without a word of their own. */
  holds?: readonly string[]
  /** What a role must be allowed to do for the screen to mean anything to it. */
  ability: Ability
}

/** The screens that the head of the page names, in its order. A new screen is one more line. */
export const SCREENS: readonly Screen[] = [
  { word: 'Cellar', path: '/cellar', holds: ['/vessels'], ability: 'readCellar' },
  { word: 'Brews', path: '/brews', ability: 'readCellar' },
  { word: 'Ledger', path: '/ledger', ability: 'exportLedger' },
]

/** Whether a path belongs to a screen without being its own. */
export function isWithin({ path: own, holds = [] }: Screen, path: string): boolean {
  return [own, ...holds].some(start => path.startsWith(`${start}/`))
}

/** The screens that a role may see. */
export function screensFor(role: Role | null): readonly Screen[] {
  return role === null ? [] : SCREENS.filter(screen => can(role, screen.ability))
}

/** Where a person begins: the first screen of the role, or their own page. */
export function firstScreen(role: Role | null): string {
  return screensFor(role)[0]?.path ?? '/you'
}
