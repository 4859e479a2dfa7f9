/** The instant that the tests' demo stands at: the morning of its own day. */
export const DEMO_MORNING = '2026-09-14T06:00:00.000Z'
