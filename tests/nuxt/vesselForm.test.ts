import { mountSuspended } from '@nuxt/test-utils/runtime'
import { defineComponent, h, nextTick, shallowReactive } from 'vue'
import { beforeEach, describe, expect, it } from 'vitest'
import { EMPTY_VESSEL_FIELDS, changedValues, fieldsOf, useVesselDraft, valuesOf } from '~/composables/useVesselForm'
import { aVessel } from './aVessel'

const heron = fieldsOf(aVessel())

async function aForm(name: string, base = EMPTY_VESSEL_FIELDS) {
  const fields = shallowReactive({ ...base })
  const wrapper = await mountSuspended(defineComponent({
    setup: () => ({ draft: useVesselDraft(name, fields, () => base) }),
    render: () => h('div'),
  }))
  return { fields, draft: wrapper.vm.draft, leave: () => wrapper.unmount() }
}

describe('what the form of a vessel sends', () => {
  it('is numbers where figures were typed, and the text where they were not', () => {
    expect(valuesOf({ ...heron, workingLitres: '1,5' })).toMatchObject({ workingLitres: 1.5, walkingOrder: 1, wood: true })
    expect(valuesOf({ ...heron, workingLitres: 'lots' })).toMatchObject({ workingLitres: 'lots' })
  })

  it('leaves the place in the walking order open when none was typed', () => {
    expect(valuesOf({ ...heron, walkingOrder: ' ' })).not.toHaveProperty('walkingOrder')
  })

  it('is only what was changed', () => {
    expect(changedValues(heron, { ...heron, workingLitres: '4100' })).toEqual({ workingLitres: 4100 })
    expect(changedValues(heron, { ...heron, walkingOrder: '' })).toEqual({ walkingOrder: '' })
    expect(changedValues(heron, heron)).toEqual({})
  })
})

describe('what was typed and not sent', () => {
  beforeEach(() => {
    sessionStorage.clear()
    useDraftStore().clear()
  })

  it('is there again, under the same id, when the form is opened anew', async () => {
    const first = await aForm('new')
    first.fields.name = 'Wigeon'
    const id = first.draft.id.value
    first.leave()
    const second = await aForm('new')
    expect(second.fields.name).toBe('Wigeon')
    expect(second.draft.id.value).toBe(id)
  })

  it('outlives the page', async () => {
    const first = await aForm('new')
    first.fields.name = 'Wigeon'
    first.leave()
    useDraftStore().drafts = {}
    expect((await aForm('new')).fields.name).toBe('Wigeon')
  })

  it('does not bring back what another has changed since', async () => {
    const first = await aForm('heron', heron)
    first.fields.name = 'Grey Heron'
    first.leave()
    const second = await aForm('heron', { ...heron, workingLitres: '4100' })
    expect(second.fields).toMatchObject({ name: 'Grey Heron', workingLitres: '4100' })
  })

  it('is gone once it was sent', async () => {
    const first = await aForm('new')
    first.fields.name = 'Wigeon'
    first.draft.drop()
    first.leave()
    expect((await aForm('new')).fields.name).toBe('')
  })

  it('survives a store that holds nonsense', async () => {
    sessionStorage.setItem('undercroft-draft:nobody:new', '{"name":7')
    expect((await aForm('new')).fields.name).toBe('')
  })
})

describe('of wood', () => {
  beforeEach(() => {
    sessionStorage.clear()
    useDraftStore().clear()
  })

  it('follows the kind until a person has said it', async () => {
    const { fields } = await aForm('new')
    fields.kind = 'steel'
    expect(fields.wood).toBe('no')
    fields.kind = 'puncheon'
    expect(fields.wood).toBe('yes')
    fields.wood = 'no'
    fields.kind = 'barrel'
    await nextTick()
    expect(fields.wood).toBe('no')
  })

  it('is never preset for a vessel that stands there', async () => {
    const { fields } = await aForm('heron', heron)
    fields.kind = 'steel'
    expect(fields.wood).toBe('yes')
  })
})
