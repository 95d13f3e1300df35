import { writeFileSync } from 'node:fs'
import type { Reporter, TestModule } from 'vitest/node'

interface Counts { passed: number, failed: number, skipped: number }

/** A file that fails to load counts as one failed test; so does an error outside the tests. */
function count(modules: readonly TestModule[], errorsOutside: number): Counts {
  const counts = { passed: 0, failed: errorsOutside, skipped: 0 }
  for (const module of modules) {
    let failedHere = 0
    for (const test of module.children.allTests()) {
      const { state } = test.result()
      if (state === 'passed') counts.passed += 1
      else if (state === 'skipped') counts.skipped += 1
      else failedHere += 1
    }
    counts.failed += module.state() === 'failed' ? Math.max(failedHere, 1) : failedHere
  }
  return counts
}

/**
 * Writes `N passed, N failed, N skipped` when the process ends, so that it is the last line whatever else prints;
 * under `npm test` it leaves the counts in a file instead, and the starter of the suites writes the line.
 */
export default class ClosingLine implements Reporter {
  onTestRunEnd(modules: readonly TestModule[], errorsOutside: readonly unknown[]) {
    const counts = count(modules, errorsOutside.length)
    const file = process.env.BAYWRIGHT_COUNTS
    if (file) writeFileSync(file, JSON.stringify(counts))
    else {
      process.once('exit', () => {
        process.stdout.write(`${counts.passed} passed, ${counts.failed} failed, ${counts.skipped} skipped\n`)
      })
    }
  }
}
