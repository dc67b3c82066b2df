import { pino, type Logger } from 'pino'

export type { Logger }

/** One JSON object a line, so that a name with a line break or a colour code in it can't forge an entry. */
export function createLogger(name: string, level: string): Logger {
  return pino({
    name,
    level,
    base: { name },
    timestamp: pino.stdTimeFunctions.isoTime,
    formatters: { level: (label) => ({ level: label }) },
  })
}
