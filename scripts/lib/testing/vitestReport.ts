import { z } from 'zod'
import type { Outcome } from './stage'

const Report = z.object({
  numPassedTests: z.number(),
  numFailedTests: z.number(),
  testResults: z.array(z.object({ status: z.string(), assertionResults: z.array(z.object({ status: z.string() })) })),
})

/**
 * Count a vitest run from its JSON report. A file that fell over before its tests, a run that ended badly although no test
 * failed, a run without a report and a run of no test at all are failures too: silence must never look like success.
 */
export function countReport(text: string | undefined, exitCode: number | null): Outcome {
  if (text === undefined) return { passed: 0, failed: 1 }
  const report = Report.parse(JSON.parse(text))
  const fallenFiles = report.testResults.filter(file => file.status === 'failed' && !file.assertionResults.some(test => test.status === 'failed'))
  const failed = report.numFailedTests + fallenFiles.length
  const endedBadly = exitCode !== 0 || report.numPassedTests === 0
  return { passed: report.numPassedTests, failed: failed === 0 && endedBadly ? 1 : failed }
}
