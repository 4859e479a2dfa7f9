import type { Me } from '#shared/schemas/auth'
import type { SetUp, SetUpState } from '#shared/schemas/setUp'

/** The first form of an empty installation. */
export function useSetUp() {
  const api = useApi()
  const session = useSession()

  /** Whether this installation still waits for its set-up. */
  function state(): Promise<SetUpState> {
    return api('/api/set-up')
  }

  /** The same for a page, asked once while it is rendered. */
  function asked() {
    const ready = useAsyncData('set-up', state)
    return { waiting: ready.data, ready }
  }

  async function setUp(body: SetUp): Promise<void> {
    session.enter(await api<Me>('/api/set-up', { method: 'POST', body }))
  }

  return { state, asked, setUp }
}
