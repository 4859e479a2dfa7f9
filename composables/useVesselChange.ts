import type { VesselView } from '#shared/schemas/vessel'
import { failureOf, failureSentence, isVesselView } from './problem'
import type { VesselFields } from './useVesselForm'
import { changedValues, fieldsOf, valuesOf } from './useVesselForm'

/** Changing or taking away a vessel that stands there, with what happens when somebody else was first. */
export function useVesselChange(vessel: VesselView) {
  const acts = useVesselActs()
  const undo = useUndoStore()
  /** The vessel as the server last told it: what a change is made to. */
  const base = shallowRef(vessel)
  /** As it stands now, when somebody else changed it first. */
  const theirs = shallowRef<VesselView | null>(null)

  const form = useForm({
    initial: () => fieldsOf(vessel),
    send: (fields: VesselFields) => acts.change(base.value.id, base.value.version, changedValues(fieldsOf(base.value), fields)),
    async done(kept) {
      const before = valuesOf(fieldsOf(base.value))
      draft.drop()
      await navigateTo('/cellar')
      if (kept.version === base.value.version) return
      undo.offerUndo({
        subject: kept.name,
        words: 'is kept as changed.',
        undo: () => acts.change(kept.id, kept.version, before).then(acts.refresh),
        undone: `${before.name} is as it was before.`,
      })
    },
    refused(failure) {
      if (failure.kind !== 'problem' || failure.problem.code !== 'stale' || !isVesselView(failure.problem.current)) return false
      theirs.value = failure.problem.current
      return true
    },
  })
  const draft = useVesselDraft(vessel.id, form.values, () => fieldsOf(base.value))

  /** Puts the question off: what was typed stays, and is asked about again when it is sent again. */
  function putOff(): void {
    theirs.value = null
  }

  /** Leaves what the other one kept, and forgets what was typed here. */
  async function keepTheirs(): Promise<void> {
    theirs.value = null
    draft.drop()
    await navigateTo('/cellar')
  }

  /** Sets what was changed here on top of what stands there now. */
  async function setMine(): Promise<void> {
    if (theirs.value === null) return
    Object.assign(form.values, mergedFields(fieldsOf(base.value), fieldsOf(theirs.value), form.values))
    base.value = theirs.value
    theirs.value = null
    await form.submit()
  }

  const leaving = ref(false)
  async function takeAway(): Promise<void> {
    if (leaving.value) return
    leaving.value = true
    try {
      await acts.takeAway(base.value)
      draft.drop()
      await navigateTo('/cellar')
      undo.offerUndo({
        subject: base.value.name,
        words: 'is taken away.',
        undo: () => acts.putBack(base.value).then(acts.refresh),
        undone: `${base.value.name} stands in the cellar again.`,
      })
    }
    catch (thrown) {
      const failure = failureOf(thrown)
      if (failure.kind === 'problem' && isVesselView(failure.problem.current)) theirs.value = failure.problem.current
      else form.tell([], failureSentence(failure))
    }
    finally {
      leaving.value = false
    }
  }

  return { form, base, theirs, putOff, keepTheirs, setMine, takeAway, leaving }
}

/** What was changed here wins; what was not follows what stands there now. */
function mergedFields(base: VesselFields, now: VesselFields, mine: VesselFields): Partial<VesselFields> {
  return {
    ...now,
    ...(base.name === mine.name ? {} : { name: mine.name }),
    ...(base.kind === mine.kind ? {} : { kind: mine.kind }),
    ...(base.workingLitres === mine.workingLitres ? {} : { workingLitres: mine.workingLitres }),
    ...(base.wood === mine.wood ? {} : { wood: mine.wood }),
    ...(base.walkingOrder === mine.walkingOrder ? {} : { walkingOrder: mine.walkingOrder }),
  }
}
