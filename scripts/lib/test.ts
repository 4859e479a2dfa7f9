import { chmodSync, mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { explain } from './failure'
import { readIfThere } from './files'
import { startTestCluster } from './testCluster'
import { oneCheck, show, stage, type Outcome } from './testing/stage'
import { countReport } from './testing/vitestReport'

const filters = process.argv.slice(2)
// All that the tests leave lies in here and goes with it, wherever they stop. PostgreSQL's user must get through.
const workFolder = mkdtempSync(join(tmpdir(), 'undercroft-tests-'))
chmodSync(workFolder, 0o711)
const stop = new AbortController()
for (const name of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) process.on(name, () => stop.abort())

const { signal } = stop
const environment = withoutSettings(process.env)
const outcomes: Outcome[] = []
try {
  for (const { name, work } of stages()) {
    const outcome = await stage(name, work, signal)
    outcomes.push(outcome)
    // Tests against a server that could not be built would only repeat that.
    if (name === 'build' && outcome.failed > 0) break
  }
}
catch (error) {
  console.error(signal.aborted ? '\nStopped before the end.' : explain(error))
  outcomes.push({ passed: 0, failed: 1 })
}
// What was told to stop may still be writing its last.
rmSync(workFolder, { recursive: true, force: true, maxRetries: 20, retryDelay: 100 })

const [passed, failed] = [sum(outcomes.map(outcome => outcome.passed)), sum(outcomes.map(outcome => outcome.failed))]
console.log(`\n${passed} passed, ${failed} failed`)
process.exit(failed === 0 ? 0 : 1)

/** Everything; with filters only those tests, and a build only where a test may start the server. */
function stages(): { name: string, work: () => Promise<Outcome> }[] {
  const check = (name: string, ...command: string[]) => ({ name, work: () => oneCheck(command, environment, signal) })
  const build = check('build', 'bash', '-euc', 'source scripts/lib/prepare.sh; prepare_build')
  const tests = { name: 'tests', work: runVitest }
  if (filters.length === 0) {
    return [build, check('type check', 'node_modules/.bin/nuxt', 'typecheck'), check('lint', 'node_modules/.bin/eslint', '.', '--max-warnings', '0'), tests]
  }
  return filters.every(filter => /^(\.\/)?tests\/(unit|nuxt)(\/|$)/.test(filter)) ? [tests] : [build, tests]
}

async function runVitest(): Promise<Outcome> {
  const report = join(workFolder, 'vitest.json')
  const { addresses, remove } = await startTestCluster({ within: workFolder, signal })
  try {
    const exitCode = await show(
      ['node_modules/.bin/vitest', 'run', '--reporter=default', '--reporter=json', `--outputFile.json=${report}`, ...filters],
      { ...environment, TMPDIR: workFolder, UNDERCROFT_TEST_CLUSTER: JSON.stringify(addresses) },
      signal,
    )
    return countReport(readIfThere(report), exitCode)
  }
  finally {
    await remove()
  }
}

/** A run proves the same whatever the caller's own installation is set to. */
function withoutSettings(from: NodeJS.ProcessEnv): NodeJS.ProcessEnv {
  const ours = /^(UNDERCROFT_|DATABASE_|NUXT_|NITRO_|SMTP_URL$|PORT$|HOST$|NODE_ENV$)/
  return Object.fromEntries(Object.entries(from).filter(([name]) => !ours.test(name)))
}

function sum(numbers: number[]): number {
  return numbers.reduce((total, number) => total + number, 0)
}
