import type { FieldFault } from '#shared/types/problem'
import type { Failure } from './problem'
import { failureOf, failureSentence } from './problem'

interface FormOptions<Values extends object, Result> {
  initial: () => Values
  /** Sends the values. Whatever it throws is told at its field or above the form. */
  send: (values: Values) => Promise<Result>
  done: (result: Result) => unknown
  /** Takes a failure that it has its own answer to; true means that it has dealt with it. */
  refused?: (failure: Failure) => boolean
}

/**
 * A form: what is typed, what is wrong at which field, and one sentence on the whole. Nothing typed is ever lost by a
 * failure; the first wrong field gets the focus.
 */
export function useForm<Values extends object, Result>(options: FormOptions<Values, Result>) {
  const values = shallowReactive(options.initial())
  const formId = useId()
  const errors = ref<Record<string, string>>({})
  const general = ref<string | null>(null)
  const busy = ref(false)

  const fieldId = (field: string) => `${formId}-${field}`

  function tell(faults: readonly FieldFault[], detail: string): void {
    errors.value = {}
    for (const { field, message } of faults) errors.value[field] ??= message
    const foreign = faults.filter(({ field }) => !(field in values)).map(({ message }) => message)
    const [first] = Object.keys(values).filter(field => field in errors.value)
    general.value = first !== undefined && foreign.length === 0 ? null : [detail, ...foreign.filter(message => message !== detail)].join(' ')
    if (first !== undefined) void nextTick(() => document.getElementById(fieldId(first))?.focus())
  }

  async function submit(): Promise<void> {
    if (busy.value) return
    busy.value = true
    general.value = null
    try {
      const result = await options.send(values)
      errors.value = {}
      await options.done(result)
    }
    catch (thrown) {
      const failure = failureOf(thrown)
      if (options.refused?.(failure)) return
      tell(failure.kind === 'problem' ? failure.problem.errors : [], failureSentence(failure))
    }
    finally {
      busy.value = false
    }
  }

  return { values, errors, general, busy, submit, fieldId, tell }
}
