import type { ActRecorded } from '#shared/schemas/ledger'
import type { Draft } from '~/stores/draft'
import type { ActFields, ActKind } from './actFields'
import { ACT_LABELS, ACT_WORDS, actBody, actFaults, emptyAct, keepWords } from './actFields'
import { useActs } from './useCorrection'
import { refreshVessels } from './useVessel'

/**
 * The form of one act on one vessel. Its ids are made once, so that a second tap or a second try keeps nothing twice;
 * what is typed stays in this tab until it has been kept.
 */
export function useActForm(kind: ActKind, vessel: { id: string, name: string }, today: string) {
  const api = useApi()
  const acts = useActs()
  const { may, me } = useMe()
  const undo = useUndoStore()
  const drafts = useDraftStore()
  const key = `${me.value?.user.id ?? 'nobody'}:${kind} ${vessel.id}`
  const ids = reactive(newIds())

  const form = useForm({
    initial: (): ActFields => emptyAct(today),
    send: (fields: ActFields): Promise<ActRecorded> => api('/api/acts', { method: 'POST', body: actBody(kind, vessel.id, fields, { act: ids.act, lines: [ids.first, ids.second] }) }),
    async done(act): Promise<void> {
      const words: string = keepWords(kind, form.values).replace(/^Keep /, '')
      stop()
      drafts.drop(key)
      clearNuxtData(name => name.startsWith('stack '))
      await refreshVessels()
      await navigateTo(`/vessels/${vessel.id}`)
      if (!may('reverse')) {
        undo.tell(`${vessel.name}: ${words}, kept. The cellar lead, the head brewer or the owner can correct it.`)
        return
      }
      const reversal = newId()
      undo.offerUndo({
        subject: vessel.name,
        words: `${words}, kept.`,
        undo: () => acts.reverseAct(act.id, { id: reversal, reason: 'undone at once' }).then(refreshVessels),
        undone: `${vessel.name} is as it was before. The lines stand struck out in its ledger.`,
      })
    },
    refused(failure) {
      if (failure.kind !== 'problem') return false
      if (failure.problem.code === 'sameIdOtherContent') {
        // The first sending arrived though its answer did not, and the form was changed since.
        Object.assign(ids, newIds())
        form.tell([], `This form was kept once already, with what it said then. Look at the ledger of ${vessel.name} before you keep it as another ${ACT_WORDS[kind].title.toLowerCase()}.`)
        return true
      }
      if (failure.problem.errors.length === 0) return false
      form.tell(actFaults(kind, form.values, failure.problem.errors), failure.problem.detail)
      return true
    },
  })

  onMounted(() => {
    const draft = drafts.read(key)
    if (draft !== null) restore(draft, form.values, ids)
  })
  // Written at each change, so that there is no moment at which it could be lost.
  const stop = watch(() => ({ ...form.values, ...ids }), draft => drafts.keep(key, draft), { flush: 'sync' })

  return form
}

function newIds() {
  return { act: newId(), first: newId(), second: newId() }
}

function restore(draft: Draft, fields: ActFields, ids: ReturnType<typeof newIds>): void {
  const text = (name: string) => typeof draft[name] === 'string' ? draft[name] : undefined
  const known = Object.keys(ACT_LABELS).flatMap((name) => {
    const value = text(name)
    return value === undefined ? [] : [[name, value]]
  })
  Object.assign(fields, Object.fromEntries(known))
  Object.assign(ids, { act: text('act') ?? ids.act, first: text('first') ?? ids.first, second: text('second') ?? ids.second })
}
