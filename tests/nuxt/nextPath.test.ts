import { describe, expect, it } from 'vitest'
import { nextPath } from '~/composables/nextPath'

describe('where a person goes after signing in', () => {
  it.each(['/cellar', '/', '/vessels/0190a000-0000-7000-8000-000000000010/edit', '/cellar?on=2026-09-14#heron', '/cellar?name=Teal%20One'])('takes %s', (path) => {
    expect(nextPath(path)).toBe(path)
  })

  it.each([
    '//evil', '/\\evil', '\\\\evil', 'javascript:alert(1)', 'data:text/html,evil', '%0d%0aLocation:', '/%09/evil', '///evil', 'http://evil', '/ /evil', '', '/a\nb',
    '/%2f/evil', '/%5cevil', '/%0d%0aLocation:%20//evil', '/%', 'cellar', ' /cellar',
  ])('refuses %j', (path) => {
    expect(nextPath(path)).toBeNull()
  })

  it('refuses what is no text', () => {
    expect([undefined, null, 7, ['/cellar', '//evil'], {}].map(nextPath)).toEqual([null, null, null, null, null])
  })
})
