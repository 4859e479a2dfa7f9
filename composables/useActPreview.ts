import type { BrewView } from '#shared/schemas/brew'
import type { VesselView } from '#shared/schemas/vessel'
import type { ActFields, ActKind } from './actFields'
import { litresOf } from './actFields'
import { daysFrom } from './civilDate'
import { useStack } from './useStack'
import { litreWords, oneDecimal } from './vesselWords'
import type { Incoming } from './whatIf'
import { pictureAfter } from './whatIf'

interface Around {
  kind: ActKind
  vessel: VesselView
  fields: ActFields
  today: string
  brews: () => readonly BrewView[]
  vessels: () => readonly VesselView[]
}

/** What the act in hand would do, reckoned as it is typed, with a word where its litres are odd. */
export function useActPreview({ kind, vessel, fields, today, brews, vessels }: Around) {
  const day = computed(() => /^[12]\d{3}-\d\d-\d\d$/.test(fields.occurredOn) && fields.occurredOn < today ? fields.occurredOn : null)
  const { stack, ready } = useStack(() => vessel.id, () => day.value)
  const { stack: targetStack, ready: targetReady } = useStack(() => fields.toVesselId || null, () => day.value)

  const out = computed(() => kind === 'fill' ? 0 : litresOf(fields.out) ?? 0)
  const into = computed(() => kind === 'fill' || kind === 'draw' ? litresOf(fields.into) ?? 0 : 0)
  const target = computed(() => vessels().find(({ id }) => id === fields.toVesselId) ?? null)

  const incoming = computed((): Incoming[] => {
    const code = fields.brewCode.trim()
    if (into.value === 0) return []
    const known = brews().find(brew => brew.code === code)
    return [{ kind: 'brew', code: code || 'the new brew', brewedOn: fields.brewedOn || fields.occurredOn || today, beerCode: known?.beerCode ?? vessel.beer?.code ?? null, litres: into.value }]
  })
  const incomingWords = computed(() => into.value === 0
    ? null
    : { litres: into.value, words: fields.brewCode.trim() || 'A new brew', more: fields.brewedOn ? `${Math.max(0, daysFrom(fields.brewedOn, fields.occurredOn || today))} d old` : 'its brew day is needed' })

  const own = computed(() => stack.value && {
    vessel,
    before: pictureAfter(stack.value, { out: 0, incoming: [] }),
    after: pictureAfter(stack.value, { out: out.value, incoming: incoming.value }),
    out: out.value,
    incoming: incomingWords.value,
  })
  /** The vessel that beer is moved into. */
  const other = computed(() => {
    if (kind !== 'move' || !stack.value || !targetStack.value || !target.value) return null
    const litres = Math.max(0, Math.min(out.value, stack.value.litres) - (litresOf(fields.lossLitres) ?? 0))
    return {
      vessel: target.value,
      before: pictureAfter(targetStack.value, { out: 0, incoming: [] }),
      after: pictureAfter(targetStack.value, { out: 0, incoming: [{ kind: 'stack', stack: stack.value, litres }] }),
      out: 0,
      incoming: { litres, words: `From ${vessel.name}`, more: litreWords(oneDecimal(litres)) },
    }
  })

  const tooMuchOut = computed(() => {
    const had = stack.value?.litres ?? 0
    const over = oneDecimal(out.value - had)
    return over > 0 ? `${litreWords(over)} more than is in ${vessel.name}. Kept as it is, the vessel counts as empty and its volume as in doubt, until the missing line is entered.` : undefined
  })
  const tooMuchIn = computed(() => {
    const over = oneDecimal((own.value?.after.litres ?? 0) - vessel.workingLitres)
    return into.value > 0 && over > 0 ? `${litreWords(over)} more than ${vessel.name} holds. Kept as it is, it stands as over its brim.` : undefined
  })
  const brimOfOther = computed(() => {
    const over = other.value ? oneDecimal(other.value.after.litres - other.value.vessel.workingLitres) : 0
    return over > 0 ? `${litreWords(over)} more than ${other.value?.vessel.name} holds. Kept as it is, it stands as over its brim.` : undefined
  })

  return { own, other, tooMuchOut: computed(() => tooMuchOut.value ?? brimOfOther.value), tooMuchIn, day: computed(() => day.value ?? today), ready: Promise.all([ready, targetReady]) }
}
