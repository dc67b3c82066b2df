import { readFile } from 'node:fs/promises'
import path from 'node:path'
import { z } from 'zod'
import { runPackageTool } from './tool'

export interface StepResult {
  passed: number
  failed: number
  /** Shown when something failed. */
  output: string
}

export type Step = () => Promise<StepResult>

/** A check of the sources: it counts as one test. */
export const createCheck =
  (args: readonly string[]): Step =>
  async () => {
    const { code, output } = await runPackageTool(args)
    return code === 0 ? { passed: 1, failed: 0, output } : { passed: 0, failed: 1, output }
  }

const reportSchema = z.object({
  numPassedTests: z.int(),
  numFailedTests: z.int(),
  numPendingTests: z.int(),
  numTodoTests: z.int(),
})

/** The tests of one Vitest project. A test that was skipped counts as failed: it guarantees nothing. */
export const createVitestStep =
  (project: string, folder: string, stackFile?: string): Step =>
  async () => {
    const report = path.join(folder, `${project}.json`)
    const { code, output } = await runPackageTool(
      [
        ...['vitest/vitest.mjs', 'run', '-c', 'tests/config/vitest.config.ts', '--project', project],
        ...['--reporter=default', '--reporter=json', `--outputFile.json=${report}`],
      ],
      stackFile === undefined ? {} : { LIDFAST_TEST_STACK: stackFile },
    )
    const counts = await readCounts(report)
    if (!counts) return { passed: 0, failed: 1, output }
    const failed = counts.numFailedTests + counts.numPendingTests + counts.numTodoTests
    // A file that can't even be loaded fails the run without a failed test in it.
    return { passed: counts.numPassedTests, failed: code !== 0 ? Math.max(failed, 1) : failed, output }
  }

async function readCounts(report: string): Promise<z.infer<typeof reportSchema> | undefined> {
  const text = await readFile(report, 'utf8').catch(() => undefined)
  return text === undefined ? undefined : reportSchema.parse(JSON.parse(text))
}
