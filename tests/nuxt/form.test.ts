import { mountSuspended, registerEndpoint } from '@nuxt/test-utils/runtime'
import { FetchError } from 'ofetch'
import { setResponseHeader, setResponseStatus } from 'h3'
import { defineComponent, h, nextTick, reactive } from 'vue'
import { afterEach, describe, expect, it, vi } from 'vitest'
import type { Problem } from '#shared/types/problem'
import FormFaults from '~/components/form/FormFaults.vue'
import FormField from '~/components/form/FormField.vue'
import { useForm } from '~/composables/useForm'

const LABELS = { name: 'Name', workingLitres: 'Working litres' }

const answers = reactive<{ status: number, body: unknown, network: boolean }>({ status: 200, body: {}, network: true })
registerEndpoint('/test/vessel', {
  method: 'POST',
  handler: (event) => {
    setResponseStatus(event, answers.status)
    if (answers.status >= 400) setResponseHeader(event, 'content-type', 'application/problem+json')
    return answers.body
  },
})

function aProblem(given: Partial<Problem>): Problem {
  return { type: 'about:blank', title: 'Not as it should be', status: 422, detail: 'Some fields need another look.', code: 'invalid', errors: [], ...given }
}

const done = vi.fn()
const Form = defineComponent({
  setup() {
    const form = useForm({
      initial: () => ({ name: '', workingLitres: '' }),
      send: values => !answers.network
        ? Promise.reject(new FetchError('Failed to fetch'))
        : $fetch<unknown>('/test/vessel', { method: 'POST', body: { ...values }, retry: 0 }),
      done,
    })
    return { form }
  },
  render() {
    const { values, errors, general, submit, fieldId } = this.form
    return h('form', { onSubmit: (event: Event) => {
      event.preventDefault()
      return submit()
    } }, [
      h(FormFaults, { general: general.value, errors: errors.value, labels: LABELS, fieldId }),
      ...(['name', 'workingLitres'] as const).map(field => h(FormField, {
        'id': fieldId(field), 'label': LABELS[field], 'error': errors.value[field], 'modelValue': values[field],
        'onUpdate:modelValue': (value: string) => {
          values[field] = value
        },
      })),
    ])
  },
})

async function send(status: number, body: unknown) {
  Object.assign(answers, { status, body })
  const wrapper = await mountSuspended(Form, { attachTo: document.body })
  const [name, litres] = wrapper.findAll('input')
  await name?.setValue('Heron')
  await wrapper.get('form').trigger('submit')
  await vi.waitFor(() => expect(wrapper.vm.form.busy.value).toBe(false))
  await nextTick()
  return { wrapper, name, litres }
}

afterEach(() => {
  done.mockReset()
  document.body.innerHTML = ''
})

describe('a form', () => {
  it('goes on when it was taken', async () => {
    await send(200, { id: 'heron' })
    expect(done).toHaveBeenCalledExactlyOnceWith({ id: 'heron' })
  })

  it('tells what is wrong at its field, in words that go with it, and goes there', async () => {
    const { wrapper, name, litres } = await send(422, aProblem({ errors: [{ field: 'workingLitres', message: 'Write litres above nought.' }] }))
    expect(done).not.toHaveBeenCalled()
    expect(name?.attributes('aria-invalid')).toBeUndefined()
    expect(litres?.attributes('aria-invalid')).toBe('true')
    const [described = ''] = litres?.attributes('aria-describedby')?.split(' ') ?? []
    expect(document.getElementById(described)?.textContent).toContain('Write litres above nought.')
    expect(document.activeElement).toBe(litres?.element)
    expect(wrapper.get('[role=alert]').text()).toBe('One field needs another look.')
  })

  it('counts several in the summary, each with a way to it', async () => {
    const { wrapper, name } = await send(422, aProblem({ errors: [{ field: 'workingLitres', message: 'This is needed.' }, { field: 'name', message: 'This is needed.' }] }))
    expect(wrapper.get('[role=alert]').text()).toContain('2 fields need another look.')
    expect(wrapper.findAll('[role=alert] a').map(link => link.text())).toEqual(['Name', 'Working litres'])
    expect(document.activeElement).toBe(name?.element)
  })

  it('tells what is wrong with a field that it does not show above the form', async () => {
    const { wrapper } = await send(422, aProblem({ detail: 'This cannot be kept.', errors: [{ field: 'id', message: 'This is not an id.' }] }))
    expect(wrapper.get('[role=alert]').text()).toBe('This cannot be kept. This is not an id.')
  })

  it('says why as the server says it', async () => {
    const { wrapper } = await send(429, aProblem({ status: 429, code: 'tooMany', detail: 'Too many tries. Wait a minute.' }))
    expect(wrapper.get('[role=alert]').text()).toBe('Too many tries. Wait a minute.')
  })

  it.each([[500, aProblem({ status: 500, code: 'failed', detail: 'relation "vessels" does not exist' })], [502, '<html>'], [400, { statusMessage: 'odd' }]])('never repeats a fault of the machine (%i)', async (status, body) => {
    const { wrapper } = await send(status, body)
    expect(wrapper.get('[role=alert]').text()).toBe('Undercroft could not do this just now. What you typed is kept here; try again.')
  })

  it('keeps what was typed without a network, and sends it when asked again', async () => {
    answers.network = false
    const { wrapper, name } = await send(200, { id: 'heron' })
    answers.network = true
    expect(wrapper.get('[role=alert]').text()).toBe('No network. What you typed is kept here; try again.')
    expect(name?.element.value).toBe('Heron')
    await wrapper.get('form').trigger('submit')
    await vi.waitFor(() => expect(done).toHaveBeenCalledOnce())
    expect(wrapper.get('[role=alert]').text()).toBe('')
  })
})
