import type { TestProject } from 'vitest/node'
import { givenStackFile } from './env'
import { readRunningStack, type RunningStack } from './running'
import { startStack } from './stack'

declare module 'vitest' {
  export interface ProvidedContext {
    /** The installation that the projects `api` and `pages` talk to. */
    stack: RunningStack
  }
}

/** `npm test` starts one for all its steps and names its file; a single test file that is run by hand starts its own. */
export default async function setup(project: TestProject): Promise<(() => Promise<void>) | undefined> {
  const given = givenStackFile()
  if (given !== undefined) {
    project.provide('stack', await readRunningStack(given))
    return undefined
  }
  const own = await startStack({ say: (sentence) => process.stdout.write(`${sentence}\n`) })
  project.provide('stack', await readRunningStack(own.runFile))
  return () => own.stop()
}
