import 'server-only'
import { pino, type Logger } from 'pino'
import { serverConfig } from './env'

let logger: Logger | undefined

/** One JSON object a line. Nothing of a request but its method, address and outcome goes in. */
export function log(): Logger {
  logger ??= pino({
    base: { name: 'web' },
    level: serverConfig().logLevel,
    timestamp: pino.stdTimeFunctions.isoTime,
    formatters: { level: (label) => ({ level: label }) },
  })
  return logger
}
