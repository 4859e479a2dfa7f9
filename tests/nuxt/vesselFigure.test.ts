import { mountSuspended } from '@nuxt/test-utils/runtime'
import { h } from 'vue'
import { describe, expect, it } from 'vitest'
import { VESSEL_KINDS } from '#shared/cellar/vessel'
import VesselFigure from '~/components/vessel/VesselFigure.vue'
import { commonScale, vesselShape } from '~/composables/vesselShape'

const HERON = { kind: 'vat', workingLitres: 4000, wood: true } as const

describe('the drawing of a vessel', () => {
  it('is a picture with one sentence', async () => {
    const figure = await mountSuspended(VesselFigure, { props: { ...HERON, sentence: 'Heron: vat of wood, empty.' } })
    expect(figure.attributes()).toMatchObject({ 'role': 'img', 'aria-label': 'Heron: vat of wood, empty.' })
    expect(figure.attributes('aria-hidden')).toBeUndefined()
  })

  it('is passed over where its words stand beside it already', async () => {
    const figure = await mountSuspended(VesselFigure, { props: HERON })
    expect(figure.attributes()).toMatchObject({ 'aria-hidden': 'true' })
    expect(figure.attributes('role')).toBeUndefined()
  })

  it('clips what is drawn inside by its wall', async () => {
    const figure = await mountSuspended(VesselFigure, { props: HERON, slots: { inside: () => h('rect', { class: 'layer' }) } })
    const clip = figure.get('clipPath')
    expect(figure.get('.layer').element.parentElement?.getAttribute('clip-path')).toBe(`url(#${clip.attributes('id')})`)
    expect(clip.get('path').attributes('d')).toBe(figure.get('.air').attributes('d'))
  })

  it('is only dotted where the vessel is away', async () => {
    const figure = await mountSuspended(VesselFigure, { props: { ...HERON, away: true } })
    expect(figure.findAll('path')).toHaveLength(1)
    expect(figure.classes()).toContain('away')
  })

  it.each(VESSEL_KINDS)('a %s is drawn in whole numbers of tenths, within its frame', (kind) => {
    const shape = vesselShape(kind, 225, false)
    expect(shape.outline).not.toMatch(/NaN|undefined|\.\d\d/)
    expect(shape.inside.width).toBeLessThan(shape.width)
    expect(shape.inside.height).toBeLessThan(shape.height)
  })

  it('shrinks all vessels alike when one would not fit on the page', () => {
    expect(commonScale([HERON])).toBe(92)
    const scale = commonScale([HERON, { kind: 'steel', workingLitres: 200_000 }])
    expect(vesselShape('steel', 200_000, false, scale).inside.height).toBeCloseTo(380, 0)
  })
})
