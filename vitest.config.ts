import vue from '@vitejs/plugin-vue'
import { defineVitestProject } from '@nuxt/test-utils/config'
import { defineConfig } from 'vitest/config'

/** A project that works on a real PostgreSQL: see tests/support/cluster.ts. */
const onCluster = { environment: 'node' as const, globalSetup: ['tests/support/cluster.ts'], testTimeout: 30_000, hookTimeout: 120_000 }

export default defineConfig({
  test: {
    maxWorkers: 2,
    projects: [
      // An odd time zone, so that nothing leans on the machine's own.
      { plugins: [vue()], test: { name: 'unit', include: ['tests/{unit,reference}/**/*.test.ts'], environment: 'node', testTimeout: 30_000, env: { TZ: 'Pacific/Chatham', UNDERCROFT_LOG: 'silent' } } },
      { test: { ...onCluster, name: 'database', include: ['tests/database/**/*.test.ts'] } },
      { test: { ...onCluster, name: 'api', include: ['tests/api/**/*.test.ts'] } },
      await defineVitestProject({ test: { name: 'nuxt', include: ['tests/nuxt/**/*.test.ts'], environment: 'nuxt' } }),
      { test: { ...onCluster, name: 'browser', include: ['tests/browser/**/*.test.ts'], fileParallelism: false, testTimeout: 90_000 } },
      { test: { name: 'faults', include: ['tests/faults/**/*.test.ts'], environment: 'node', fileParallelism: false, testTimeout: 120_000, hookTimeout: 120_000 } },
    ],
  },
})
