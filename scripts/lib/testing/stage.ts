import { spawn } from 'node:child_process'
import { once } from 'node:events'

export interface Outcome {
  passed: number
  failed: number
}

/** Do a part of the run under a heading, and say how long it took. What it throws counts as one failure. */
export async function stage(name: string, work: () => Promise<Outcome>, signal: AbortSignal): Promise<Outcome> {
  signal.throwIfAborted()
  console.log(`\n── ${name}`)
  const began = Date.now()
  const outcome = await work().catch((error: unknown) => {
    signal.throwIfAborted()
    console.error(error)
    return { passed: 0, failed: 1 }
  })
  signal.throwIfAborted()
  console.log(`── ${name}: ${outcome.failed === 0 ? 'passed' : 'FAILED'} in ${((Date.now() - began) / 1000).toFixed(1)} s`)
  return outcome
}

/** A command that passes or fails as a whole. */
export async function oneCheck(command: readonly string[], environment: NodeJS.ProcessEnv, signal: AbortSignal): Promise<Outcome> {
  const code = await show(command, environment, signal)
  return code === 0 ? { passed: 1, failed: 0 } : { passed: 0, failed: 1 }
}

/** Run a command on the screen and give its exit code. It has a process group of its own, so that all of it can be ended; and it ends with us. */
export async function show(command: readonly string[], environment: NodeJS.ProcessEnv, signal: AbortSignal): Promise<number | null> {
  const child = spawn('/usr/bin/setpriv', ['--pdeathsig', 'TERM', '--', ...command], { env: environment, detached: true, stdio: ['ignore', 'inherit', 'inherit'] })
  const end = () => {
    if (child.pid !== undefined) process.kill(-child.pid, 'SIGTERM')
  }
  signal.addEventListener('abort', end)
  try {
    await once(child, 'exit')
    return child.exitCode
  }
  finally {
    signal.removeEventListener('abort', end)
  }
}
