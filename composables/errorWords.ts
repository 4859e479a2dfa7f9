export interface ErrorWords {
  title: string
  sentence: string
  /** Whether trying again can help. */
  again: boolean
}

const BY_STATUS: Record<number, ErrorWords> = {
  403: { title: 'Not for your role', sentence: 'What is here is kept by others of the crew. If you need it, ask the owner.', again: false },
  404: { title: 'Nothing stands here', sentence: 'The page may have been moved, or what it showed was taken away.', again: false },
  429: { title: 'Too many tries', sentence: 'Wait a little before you try again.', again: true },
  503: { title: 'Not ready yet', sentence: 'Undercroft is starting or being looked after. Nothing that was kept is lost.', again: true },
}
/** Whatever went wrong, it will go wrong again until this is mended. */
export const OFFLINE_WORDS: ErrorWords = { title: 'No network', sentence: 'This page cannot be fetched now. What you typed on others is kept on this device.', again: true }

const OTHERWISE: ErrorWords = { title: 'This did not work', sentence: 'The fault is on our side. Nothing that was kept is lost.', again: true }

/** What a page of an error says. A fixed set of words: an error's own message is never shown. */
export function errorWords(status: number): ErrorWords {
  return BY_STATUS[status] ?? OTHERWISE
}
