import { spawn } from 'node:child_process'
import type { Account } from './postgres/account'

/** Run a command to its end and give what it wrote. Its own process group keeps a Ctrl-C of the terminal away from it. */
export async function run(command: readonly string[], options: { as?: Account, cwd?: string } = {}): Promise<{ code: number | null, output: string }> {
  const [program, ...rest] = command
  if (program === undefined) throw new Error('no command given')
  return new Promise((resolve, reject) => {
    const child = spawn(program, rest, {
      cwd: options.cwd,
      uid: options.as?.uid,
      gid: options.as?.gid,
      detached: true,
      stdio: ['ignore', 'pipe', 'pipe'],
    })
    let output = ''
    child.stdout.on('data', (chunk: Buffer) => output += chunk.toString())
    child.stderr.on('data', (chunk: Buffer) => output += chunk.toString())
    child.on('error', reject)
    child.on('close', code => resolve({ code, output }))
  })
}
