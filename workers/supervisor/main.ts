import path from 'node:path'
import { inheritedEnvironment, readConfig } from '../env'
import { startOptions } from './start-options'
import { createStack, type Stack } from './stack'
import { Stopped } from './supervisor'

const root = path.resolve(import.meta.dirname, '../..')
const [mode = 'start', ...options] = process.argv.slice(2)
const parentAtStart = process.ppid

const print = (text: string) => process.stdout.write(`${text}\n`)
const say = (sentence: string) => print(`${new Date().toISOString().slice(11, 19)}  ${sentence}`)

let stack: Stack | undefined
let ending: Promise<never> | undefined

/** Everything goes down once, whoever asks first; the first reason decides the exit code. */
function end(code: number): Promise<never> {
  ending ??= (async () => {
    await stack?.stop()
    process.exit(code)
  })()
  return ending
}

function endOnSignal(): void {
  const quietly = () => {
    if (!ending) print('\nStopping …')
    void end(0)
  }
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) process.on(signal, quietly)
  // npm was killed without a chance to tell us.
  setInterval(() => process.ppid !== parentAtStart && quietly(), 1_000).unref()
}

async function main(): Promise<void> {
  const { resetDemo, scenario } = startOptions(options)
  const config = readConfig()
  if ((resetDemo || scenario !== undefined) && !config.demo)
    throw new Error('--reset-demo and --scenario need the demo, but LIDFAST_DEMO is off.')
  const common = { root, config, inherited: inheritedEnvironment(), resetDemo, scenario, say }
  stack = await createStack({ ...common, mode: mode === 'dev' ? 'dev' : 'start' })
  await stack.start()
  greet(stack)
}

function greet({ config }: Stack): void {
  print('')
  print(`Lidfast is at ${config.baseUrl}`)
  print(`Sensors publish to mqtt://${config.mqttHost}:${config.mqttPort}`)
  if (config.demo) {
    print('')
    print('The demo is Saltmarsh Yard. Sign in with the password saltmarsh-demo as')
    print('  owner@example.org   runs the place')
    print('  maker@example.org   turns and finishes')
    print('  house@example.org   lends a hand')
    print('  desk@example.org    looks on')
  }
  if (config.smtpUrl === undefined) {
    print('')
    print('SMTP_URL is not set, so no mail goes out: no confirmation of addresses, no warnings by mail.')
  }
  print('')
  print('Ctrl-C stops everything.')
}

endOnSignal()
main().catch((error: unknown) => {
  if (error instanceof Stopped) return end(0)
  process.stderr.write(`\n${error instanceof Error ? error.message : String(error)}\n`)
  return end(1)
})
