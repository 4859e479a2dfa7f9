import type { Standing } from '#shared/cellar/vessel'
import type { MarkName } from './marks'

/** How each standing is shown: its mark, then its word. */
export const STANDING_SIGNS: Record<Standing, { mark: MarkName, word: string }> = {
  resting: { mark: 'standing-resting', word: 'Resting' },
  steerTasteDue: { mark: 'standing-steer', word: 'Steer taste due' },
  drawTasteDue: { mark: 'standing-drawtaste', word: 'Draw taste due' },
  called: { mark: 'standing-called', word: 'Called' },
  held: { mark: 'standing-held', word: 'Held' },
  drawnOpen: { mark: 'standing-drawnopen', word: 'Drawn open' },
  settling: { mark: 'standing-settling', word: 'Settling' },
  setApart: { mark: 'standing-apart', word: 'Set apart' },
  soaking: { mark: 'standing-soaking', word: 'Soaking' },
  dry: { mark: 'standing-dry', word: 'Dry' },
  away: { mark: 'standing-away', word: 'Away' },
  retired: { mark: 'standing-retired', word: 'Retired' },
}
