import { expect, it } from 'vitest'
import { worthShowing } from '../../../scripts/lib/serverLog'

it('shows the words of warnings and errors, whether levels are numbers or names', () => {
  expect(worthShowing('{"level":40,"msg":"the pool is full"}')).toBe('server: the pool is full')
  expect(worthShowing('{"level":"error","msg":"no answer"}')).toBe('server: no answer')
})

it('keeps everyday lines to the log', () => {
  expect(worthShowing('{"level":30,"msg":"request done"}')).toBeUndefined()
  expect(worthShowing('{"level":"info","msg":"request done"}')).toBeUndefined()
  expect(worthShowing('Listening on http://127.0.0.1:3000')).toBeUndefined()
})

it('shows what is no log line, such as a crash of Node itself', () => {
  expect(worthShowing('Error: out of memory')).toBe('Error: out of memory')
})
