import { mountSuspended } from '@nuxt/test-utils/runtime'
import { createError } from 'h3'
import { describe, expect, it } from 'vitest'
import ErrorPage from '~/error.vue'

describe('the page of an error', () => {
  it.each([
    [404, 'Nothing stands here', ['Back to the beginning']],
    [403, 'Not for your role', ['Back to the beginning']],
    [500, 'This did not work', ['Try now', 'Back to the beginning']],
    [503, 'Not ready yet', ['Try now', 'Back to the beginning']],
    [418, 'This did not work', ['Try now', 'Back to the beginning']],
  ] as const)('says what %i means in our own words, and has a way out', async (statusCode, title, buttons) => {
    const error = createError({ statusCode, statusMessage: 'relation "vessels" does not exist', message: 'at Object.load (/srv/secret.ts:1:1)' })
    const page = await mountSuspended(ErrorPage, { props: { error } })
    expect(page.get('h1').text()).toBe(title)
    expect(page.findAll('button').map(button => button.text())).toEqual(buttons)
    expect(page.html()).not.toMatch(/relation|secret/)
  })

  it('speaks of the network where there is none', async () => {
    const page = await mountSuspended(ErrorPage, { props: { error: createError({ statusCode: 500 }) } })
    dispatchEvent(new Event('offline'))
    await expect.poll(() => page.get('h1').text()).toBe('No network')
    dispatchEvent(new Event('online'))
    await expect.poll(() => page.get('h1').text()).toBe('This did not work')
  })
})
