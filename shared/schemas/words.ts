import type { z } from 'zod'

/**
 * What a person is told when a value is not right, for each fault that a schema finds and does not name itself.
 * Handed to every parse as its error map; a schema's own words go before these.
 */
export function words(issue: z.core.$ZodRawIssue): string {
  switch (issue.code) {
    case 'invalid_type': return wrongType(issue.expected, issue.input)
    case 'too_small': return tooSmall(issue)
    case 'too_big': return tooBig(issue)
    case 'invalid_value': return `Choose one of: ${issue.values.join(', ')}.`
    case 'unrecognized_keys': return 'This field is not known here.'
    case 'invalid_format': return issue.format === 'uuid' ? 'This is not an id.' : 'This is not written as it should be.'
    default: return 'This cannot be taken as it stands.'
  }
}

type Limit<Issue extends { origin: string, inclusive?: boolean }> = Pick<Issue, Extract<keyof Issue, 'origin' | 'inclusive' | 'minimum' | 'maximum'>>

function wrongType(expected: string, input: unknown): string {
  if (input === undefined || input === null || input === '') return 'This is needed.'
  if (expected === 'number' || expected === 'int') return 'Write a number in figures, with a point before decimals.'
  if (expected === 'string') return 'Write one piece of text.'
  if (expected === 'boolean') return 'Say yes or no.'
  return 'This is not of the right kind.'
}

function tooSmall(issue: Limit<z.core.$ZodIssueTooSmall>): string {
  if (issue.origin === 'string') return Number(issue.minimum) <= 1 ? 'This is needed.' : `Use ${issue.minimum} signs or more.`
  return issue.inclusive ? `Write ${issue.minimum} or more.` : `Write more than ${issue.minimum}.`
}

function tooBig(issue: Limit<z.core.$ZodIssueTooBig>): string {
  return issue.origin === 'string' ? `Use ${issue.maximum} signs at most.` : `Write ${issue.maximum} at most.`
}
