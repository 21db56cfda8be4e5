import { expect, test } from 'vitest'
import { addCounts, countVitest, noTests, oneCheck, summarize } from '../../../scripts/lib/counts.mjs'

const file = (status: string, ...tests: string[]) => ({ status, assertionResults: tests.map(status => ({ status })) })
const report = (passed: number, failed: number, pending: number, testResults = [file('passed', 'passed')]) =>
  ({ numPassedTests: passed, numFailedTests: failed, numPendingTests: pending, testResults })

test('the last line gives the three numbers, and is good only without a failure', () => {
  expect(summarize({ passed: 12, failed: 0, skipped: 1 })).toEqual({ line: 'tests: 12 passed, 0 failed, 1 skipped', isGood: true })
  expect(summarize({ passed: 12, failed: 1, skipped: 0 })).toEqual({ line: 'tests: 12 passed, 1 failed, 0 skipped', isGood: false })
})

test('a run without any test is not good', () => {
  expect(summarize(noTests)).toEqual({ line: 'tests: 0 passed, 0 failed, 0 skipped', isGood: false })
  expect(summarize({ passed: 0, failed: 0, skipped: 9 }).isGood).toBe(false)
})

test('counts add up over the steps', () => {
  expect(addCounts([oneCheck(true), oneCheck(false), { passed: 3, failed: 0, skipped: 2 }])).toEqual({ passed: 4, failed: 1, skipped: 2 })
})

test('a good report counts test by test; what is still to be written counts as skipped', () => {
  expect(countVitest({ ...report(5, 0, 1), numTodoTests: 2 }, 0)).toEqual({ passed: 5, failed: 0, skipped: 3 })
})

test('a file that could not be loaded counts as a failure of its own', () => {
  expect(countVitest(report(5, 1, 0, [file('failed', 'passed', 'failed'), file('failed')]), 1)).toEqual({ passed: 5, failed: 2, skipped: 0 })
})

test('a bad ending that no test explains is a failure', () => {
  expect(countVitest(report(5, 0, 0), 1)).toEqual({ passed: 5, failed: 1, skipped: 0 })
})

test('no tests, or no report at all, is a failure', () => {
  expect(countVitest(report(0, 0, 0, []), 0)).toEqual({ passed: 0, failed: 1, skipped: 0 })
  expect(countVitest(undefined, 0)).toEqual({ passed: 0, failed: 1, skipped: 0 })
})
