import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { ROLES } from '#shared/abilities'
import { STANDINGS } from '#shared/cellar/vessel'
import { MARKS } from '~/composables/marks'
import { ROLE_WORDS } from '~/composables/roleWords'
import { firstScreen } from '~/composables/screens'
import { STANDING_SIGNS } from '~/composables/standings'

const sprite = readFileSync('assets/marks.svg', 'utf8')

describe('signs', () => {
  it.each(STANDINGS)('the standing %s has a mark and a word of its own', (standing) => {
    const { mark, word } = STANDING_SIGNS[standing]
    expect(word).toMatch(/^[A-Z][a-z ]+$/)
    expect(STANDINGS.filter(other => STANDING_SIGNS[other].mark === mark || STANDING_SIGNS[other].word === word)).toEqual([standing])
  })

  it.each(MARKS)('the mark %s is drawn', (mark) => {
    expect(sprite).toContain(`<symbol id="${mark}"`)
  })

  it('takes every role to a screen that it may see', () => {
    expect(Object.fromEntries(ROLES.map(role => [role, firstScreen(role)]))).toEqual({
      owner: '/cellar', headBrewer: '/cellar', cellarLead: '/cellar', cellarHand: '/cellar', packager: '/cellar', taster: '/you', auditor: '/cellar',
    })
    expect(Object.keys(ROLE_WORDS).sort()).toEqual([...ROLES].sort())
  })
})
