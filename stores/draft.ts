/** What was typed into a form that has not been sent: plain fields only. */
export type Draft = Record<string, string | boolean>

const PREFIX = 'undercroft-draft:'

/** Forms that were begun and not sent, kept in this tab until they are. */
export const useDraftStore = defineStore('draft', () => {
  const drafts = ref<Record<string, Draft>>({})

  function read(key: string): Draft | null {
    return drafts.value[key] ?? readStored(key)
  }

  function keep(key: string, draft: Draft): void {
    drafts.value = { ...drafts.value, [key]: draft }
    attempt(() => sessionStorage.setItem(PREFIX + key, JSON.stringify(draft)))
  }

  function drop(key: string): void {
    drafts.value = Object.fromEntries(Object.entries(drafts.value).filter(([name]) => name !== key))
    attempt(() => sessionStorage.removeItem(PREFIX + key))
  }

  /** Forgets all of them, when a person leaves. */
  function clear(): void {
    drafts.value = {}
    attempt(() => {
      for (const name of Object.keys(sessionStorage)) if (name.startsWith(PREFIX)) sessionStorage.removeItem(name)
    })
  }

  return { drafts, read, keep, drop, clear }
})

function readStored(key: string): Draft | null {
  let stored: Draft | null = null
  attempt(() => {
    const parsed: unknown = JSON.parse(sessionStorage.getItem(PREFIX + key) ?? 'null')
    if (isDraft(parsed)) stored = parsed
  })
  return stored
}

function isDraft(value: unknown): value is Draft {
  return typeof value === 'object' && value !== null
    && Object.values(value).every(field => typeof field === 'string' || typeof field === 'boolean')
}

/** A browser may refuse its storage, or have none left: a draft is a comfort, and the form works without. */
function attempt(act: () => void): void {
  try {
    act()
  }
  catch { /* as said above */ }
}
