/** Something that was just kept and can be taken back for a few seconds. */
export interface UndoOffer {
  /** What it was done to, set in bold: `Heron`. */
  subject: string
  /** What was done to it: `kept`. */
  words: string
  undo: () => Promise<unknown>
  /** The sentence when that has been done. */
  undone: string
}

export const UNDO_SECONDS = 10
const TICK_MS = 1000

/** The one undo at the foot of the page. A new act replaces it. */
export const useUndoStore = defineStore('undo', () => {
  const offer = shallowRef<UndoOffer | null>(null)
  const secondsLeft = ref(0)
  const busy = ref(false)
  /** The clock stands while a person is on the bar. */
  const held = ref(false)
  /** What became of an undo, once it has been asked for. */
  const outcome = ref<string | null>(null)
  let timer: ReturnType<typeof setInterval> | undefined

  function stop(): void {
    clearInterval(timer)
    timer = undefined
  }

  function clear(): void {
    stop()
    offer.value = null
    outcome.value = null
    held.value = false
  }

  function tick(): void {
    if (held.value || busy.value) return
    secondsLeft.value -= 1
    if (secondsLeft.value <= 0) clear()
  }

  function start(): void {
    stop()
    secondsLeft.value = UNDO_SECONDS
    timer = setInterval(tick, TICK_MS)
  }

  function offerUndo(next: UndoOffer): void {
    clear()
    offer.value = next
    start()
  }

  /** Says what became of something that cannot be taken back here. */
  function tell(words: string): void {
    clear()
    outcome.value = words
    start()
  }

  /** Takes it back, and says how that went. */
  async function take(): Promise<void> {
    const taken = offer.value
    if (taken === null || busy.value) return
    busy.value = true
    try {
      await taken.undo()
      outcome.value = taken.undone
    }
    catch {
      outcome.value = `${taken.subject} could not be put back: somebody may have changed it since, or there is no network.`
    }
    finally {
      busy.value = false
      offer.value = null
      held.value = false
      start()
    }
  }

  return { offer, secondsLeft, busy, held, outcome, clear, offerUndo, tell, take }
})
