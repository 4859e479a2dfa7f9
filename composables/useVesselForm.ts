import type { VesselKind } from '#shared/cellar/vessel'
import { VESSEL_KINDS, usuallyWooden } from '#shared/cellar/vessel'
import type { VesselView } from '#shared/schemas/vessel'
import type { Draft } from '~/stores/draft'
import type { VesselValues } from './useVessels'
import { plainNumber } from './plainNumber'

/** A vessel as it stands in its form: all that is typed is text until it is sent. */
export interface VesselFields {
  name: string
  kind: VesselKind
  workingLitres: string
  wood: 'yes' | 'no'
  walkingOrder: string
}

export const VESSEL_FIELDS = ['name', 'kind', 'workingLitres', 'walkingOrder', 'wood'] as const satisfies readonly (keyof VesselFields)[]

export const VESSEL_LABELS: Record<keyof VesselFields, string> = {
  name: 'Name',
  kind: 'Kind',
  workingLitres: 'Working litres',
  wood: 'Of wood',
  walkingOrder: 'Place in the walking order',
}

export const EMPTY_VESSEL_FIELDS: VesselFields = { name: '', kind: 'vat', workingLitres: '', wood: 'yes', walkingOrder: '' }

export function fieldsOf({ name, kind, workingLitres, wood, walkingOrder }: VesselView): VesselFields {
  return { name, kind, workingLitres: String(workingLitres), wood: wood ? 'yes' : 'no', walkingOrder: String(walkingOrder) }
}

export function valuesOf(fields: VesselFields): VesselValues {
  return {
    name: fields.name,
    kind: fields.kind,
    workingLitres: plainNumber(fields.workingLitres),
    wood: fields.wood === 'yes',
    // Left open, the next place is given.
    ...(fields.walkingOrder.trim() === '' ? {} : { walkingOrder: plainNumber(fields.walkingOrder) }),
  }
}

/** What differs between two states of the form, as it would be sent. */
export function changedValues(before: VesselFields, after: VesselFields): Partial<VesselValues> {
  const values = valuesOf(after)
  return {
    ...(before.name === after.name ? {} : { name: values.name }),
    ...(before.kind === after.kind ? {} : { kind: values.kind }),
    ...(before.workingLitres === after.workingLitres ? {} : { workingLitres: values.workingLitres }),
    ...(before.wood === after.wood ? {} : { wood: values.wood }),
    // Wiped out on purpose, it goes as it is, so that the answer says that a place is needed.
    ...(before.walkingOrder === after.walkingOrder ? {} : { walkingOrder: values.walkingOrder ?? '' }),
  }
}

/**
 * Keeps what is typed into the form of a vessel until it is sent, also when the session ends or the page is loaded anew,
 * and presets *of wood* by kind until a person has said it. Only what was changed is kept: the rest follows what stands
 * in the cellar by then.
 */
export function useVesselDraft(form: string, fields: VesselFields, base: () => VesselFields) {
  const { me } = useMe()
  const drafts = useDraftStore()
  const key = `${me.value?.user.id ?? 'nobody'}:${form}`
  const woodTouched = ref(form !== 'new')
  const id = ref(newId())

  onMounted(() => {
    const draft = drafts.read(key)
    if (draft !== null) {
      woodTouched.value = true
      Object.assign(fields, fieldsOfDraft(draft, fields))
      woodTouched.value = form !== 'new' || fields.wood !== usualWood(fields.kind)
      if (typeof draft.id === 'string') id.value = draft.id
    }
  })
  let presetting = false
  watch(() => fields.kind, (kind) => {
    if (woodTouched.value) return
    presetting = true
    fields.wood = usualWood(kind)
    presetting = false
  }, { flush: 'sync' })
  watch(() => fields.wood, () => {
    if (!presetting) woodTouched.value = true
  }, { flush: 'sync' })
  // Written at each change, so that there is no moment at which it could be lost.
  const stop = watch(() => ({ ...fields }), () => {
    drafts.keep(key, { ...changedFields(base(), fields), id: id.value })
  }, { flush: 'sync' })

  function drop(): void {
    stop()
    drafts.drop(key)
  }

  return { id, drop, renewId: () => (id.value = newId()) }
}

function usualWood(kind: VesselKind): VesselFields['wood'] {
  return usuallyWooden(kind) ? 'yes' : 'no'
}

/** The fields that differ from what the form began with. */
function changedFields(base: VesselFields, fields: VesselFields): Partial<VesselFields> {
  return Object.fromEntries(VESSEL_FIELDS.filter(field => base[field] !== fields[field]).map(field => [field, fields[field]]))
}

function fieldsOfDraft(draft: Draft, fields: VesselFields): VesselFields {
  const text = (name: keyof VesselFields) => typeof draft[name] === 'string' ? draft[name] : fields[name]
  return {
    name: text('name'),
    kind: VESSEL_KINDS.find(kind => kind === draft.kind) ?? fields.kind,
    workingLitres: text('workingLitres'),
    wood: draft.wood === 'yes' || draft.wood === 'no' ? draft.wood : fields.wood,
    walkingOrder: text('walkingOrder'),
  }
}
