import { defineNitroConfig } from 'nitropack/config'

/** The floor of the bench: a bare Nitro server with pg and nothing else. Built into the bench's own temporary folder. */
export default defineNitroConfig({
  compatibilityDate: '2026-07-01',
  output: { dir: process.env.BENCH_FLOOR_OUTPUT },
  buildDir: `${process.env.BENCH_FLOOR_OUTPUT}/.nitro`,
})
