import { pino, type DestinationStream, type Logger } from 'pino'

export type { Logger }

/**
 * Pino's own writer tries for ever to write to a pipe whose reader is gone, and so keeps a process alive that should
 * end with the supervisor. This one lets such a line go: there is nobody left to read it.
 */
const standardOutput: DestinationStream = { write: (line) => void process.stdout.write(line) }

/** One JSON object a line, so that a name with a line break or a colour code in it can't forge an entry. */
export function createLogger(name: string, level: string): Logger {
  if (!process.stdout.listeners('error').includes(ignore)) process.stdout.on('error', ignore)
  const options = {
    name,
    level,
    base: { name },
    timestamp: pino.stdTimeFunctions.isoTime,
    formatters: { level: (label: string) => ({ level: label }) },
    serializers: { err: shortError },
  }
  return pino(options, standardOutput)
}

const ignore = () => undefined

/** The database's errors carry their whole connection; a log needs what happened and where. */
function shortError(error: unknown): unknown {
  if (!(error instanceof Error)) return error
  const code = 'code' in error ? error.code : undefined
  return { type: error.name, message: error.message, code, stack: error.stack }
}
