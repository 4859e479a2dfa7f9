import { describe, expect, it } from 'vitest'
import { countReport } from '../../../scripts/lib/testing/vitestReport'

function report(numPassedTests: number, numFailedTests: number, files: { status: string, assertionResults: { status: string }[] }[] = []): string {
  return JSON.stringify({ numPassedTests, numFailedTests, testResults: files })
}

describe('countReport', () => {
  it('counts passed and failed tests', () => {
    const files = [{ status: 'failed', assertionResults: [{ status: 'passed' }, { status: 'failed' }] }]
    expect(countReport(report(4, 1, files), 1)).toEqual({ passed: 4, failed: 1 })
    expect(countReport(report(5, 0), 0)).toEqual({ passed: 5, failed: 0 })
  })

  it('counts a file that fell over before its tests', () => {
    expect(countReport(report(5, 0, [{ status: 'failed', assertionResults: [] }]), 1)).toEqual({ passed: 5, failed: 1 })
  })

  it.each([
    ['a run without a report', undefined, 1],
    ['a run of no test', report(0, 0), 0],
  ])('counts %s as one failure', (_, text, exitCode) => {
    expect(countReport(text, exitCode)).toEqual({ passed: 0, failed: 1 })
  })

  it('counts a run that ended badly although no test failed', () => {
    expect(countReport(report(5, 0), 1)).toEqual({ passed: 5, failed: 1 })
    expect(countReport(report(5, 0), null)).toEqual({ passed: 5, failed: 1 })
  })
})
