import 'server-only'
import { pino, type DestinationStream, type Logger } from 'pino'
import { serverConfig } from './env'

let logger: Logger | undefined

/** Pino's own writer tries for ever when the reader of the pipe is gone, and then the process never ends. */
const standardOutput: DestinationStream = { write: (line) => void process.stdout.write(line) }

function createLog(): Logger {
  process.stdout.on('error', () => undefined)
  const options = {
    base: { name: 'web' },
    level: serverConfig().logLevel,
    timestamp: pino.stdTimeFunctions.isoTime,
    formatters: { level: (label: string) => ({ level: label }) },
  }
  return pino(options, standardOutput)
}

/** One JSON object a line. Nothing of a request but its method, address and outcome goes in. */
export const log = (): Logger => (logger ??= createLog())
