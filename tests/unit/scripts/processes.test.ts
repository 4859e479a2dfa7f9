import { spawn } from 'node:child_process'
import { once } from 'node:events'
import { expect, it } from 'vitest'
import { endProcess, isAlive, markOf } from '../../../scripts/lib/processes'

function markOfChild(pid: number | undefined) {
  const mark = pid === undefined ? undefined : markOf(pid)
  if (!mark) throw new Error('the child did not start')
  return mark
}

it('knows a living process and tells it from another of the same number', () => {
  const own = markOf(process.pid)
  expect(own && isAlive(own)).toBe(true)
  expect(isAlive({ pid: process.pid, began: 'another time' })).toBe(false)
  expect(markOf(Number.NaN)).toBeUndefined()
})

it('ends a process that does as it is asked', async () => {
  const child = spawn('sleep', ['60'])
  await endProcess(markOfChild(child.pid), { ask: 'SIGTERM', patience: 5000, insist: 'SIGKILL' })
  expect(child.signalCode ?? (await once(child, 'exit'))[1]).toBe('SIGTERM')
})

it('insists where it does not', async () => {
  const child = spawn('bash', ['-c', 'trap "" TERM; echo deaf; while :; do sleep 0.1; done'])
  await once(child.stdout, 'data')
  await endProcess(markOfChild(child.pid), { ask: 'SIGTERM', patience: 300, insist: 'SIGKILL' })
  expect(child.signalCode ?? (await once(child, 'exit'))[1]).toBe('SIGKILL')
})

it('leaves alone a process that took over the number', async () => {
  const child = spawn('sleep', ['60'])
  const mark = markOfChild(child.pid)
  await endProcess({ ...mark, began: 'before' }, { ask: 'SIGKILL', patience: 100, insist: 'SIGKILL' })
  expect(isAlive(mark)).toBe(true)
  child.kill()
})
