import { mkdtemp, rm } from 'node:fs/promises'
import os from 'node:os'
import path from 'node:path'
import { createCheck, createVitestStep, type Step } from './support/steps'
import { startStack, type TestStack } from './support/stack'
import { endRunningTools } from './support/tool'

/** `npm test`: everything, in an order that fails early. `npm test -- types unit` runs only the named steps. */
const wanted = process.argv.slice(2)
const say = (text: string) => process.stdout.write(`${text}\n`)
const folder = await mkdtemp(path.join(os.tmpdir(), 'lidfast-results-'))
const eslintConfig = ['-c', 'tests/config/eslint.config.mjs']
const cruiserConfig = ['--config', 'tests/config/dependency-cruiser.cjs']
const cruised = ['app', 'lib', 'db', 'workers', 'fake-sensors', 'proxy.ts']

const checks: Record<string, Step> = {
  types: createCheck(['typescript/bin/tsc', '--noEmit']),
  lint: createCheck(['eslint/bin/eslint.js', ...eslintConfig, '--max-warnings=0', '.']),
  format: createCheck(['prettier/bin/prettier.cjs', '--check', '--log-level=warn', '.']),
  cycles: createCheck(['dependency-cruiser/bin/dependency-cruise.mjs', ...cruiserConfig, ...cruised]),
  unit: createVitestStep('unit', folder),
  integration: createVitestStep('integration', folder),
}
const onStack = ['api', 'pages']

const totals = { passed: 0, failed: 0 }
let stack: TestStack | undefined

async function runStep(name: string, step: Step): Promise<void> {
  if (wanted.length > 0 && !wanted.includes(name)) return
  const began = performance.now()
  const { passed, failed, output } = await step()
  totals.passed += passed
  totals.failed += failed
  const seconds = Math.round((performance.now() - began) / 1000)
  if (failed > 0) say(`\n${output}\n`)
  say(`${failed > 0 ? 'FAILED' : 'ok    '}  ${name}: ${passed} passed, ${failed} failed, ${seconds} s`)
}

const runChecks = async (...names: string[]) => {
  for (const name of names) {
    const step = checks[name]
    if (step) await runStep(name, step)
  }
}

async function runOnStack(): Promise<void> {
  if (wanted.length > 0 && !onStack.some((name) => wanted.includes(name))) return
  await runStep('stack', async () => {
    try {
      stack = await startStack({ say: (sentence) => say(`        ${sentence}`) })
      return { passed: 1, failed: 0, output: '' }
    } catch (error) {
      return { passed: 0, failed: 1, output: String(error) }
    }
  })
  if (!stack) return
  for (const name of onStack) await runStep(name, createVitestStep(name, folder, stack.runFile))
}

let ending: Promise<void> | undefined
const cleanUp = () =>
  (ending ??= (async () => {
    await endRunningTools()
    await stack?.stop()
    await rm(folder, { recursive: true, force: true })
  })())

for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) {
  process.on(signal, () => {
    say('\nStopping …')
    void cleanUp().then(() => process.exit(1))
  })
}

const known = [...Object.keys(checks), ...onStack]
const unknown = wanted.filter((name) => !known.includes(name))
if (unknown.length > 0) {
  say(`There is no step "${unknown.join('", "')}". There are: ${known.join(', ')}.`)
  await cleanUp()
  process.exit(1)
}
// Two lanes for two cores; what starts servers of its own comes after and has the machine to itself.
await Promise.all([runChecks('types', 'lint'), runChecks('format', 'cycles', 'unit')])
await runChecks('integration')
await runOnStack()
await cleanUp()
say(`\n${totals.passed} passed, ${totals.failed} failed`)
process.exit(totals.failed > 0 ? 1 : 0)
