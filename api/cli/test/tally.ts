import { existsSync, readFileSync } from 'node:fs';
import { z } from 'zod';

const report = z.object({
  numPassedTests: z.number(),
  numFailedTests: z.number(),
  testResults: z.array(z.object({ name: z.string(), status: z.string(), message: z.string().optional(), assertionResults: z.array(z.unknown()) })),
});

export interface Tally {
  passed: number;
  failed: number;
}

/**
 * Counts of one vitest run from its JSON report. A file that could not be read as tests counts as one failure, and
 * so does a run that failed for a reason outside any test (an unhandled error, no report at all).
 */
export const tallyOf = (reportFile: string, exitCode: number): Tally => {
  if (!existsSync(reportFile)) return { passed: 0, failed: 1 };
  const parsed = report.parse(JSON.parse(readFileSync(reportFile, 'utf8')));
  const broken = parsed.testResults.filter((file) => file.status === 'failed' && !file.assertionResults.some((one) => (one as { status?: string }).status === 'failed')).length;
  const failed = parsed.numFailedTests + broken;
  return { passed: parsed.numPassedTests, failed: failed === 0 && exitCode !== 0 ? 1 : failed };
};
