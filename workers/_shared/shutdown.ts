import type { Logger } from './logger'

export interface ShutdownOptions {
  logger: Logger
  /** After this long the process ends with code 1, whatever still hangs. */
  graceMs?: number
}

/**
 * Runs `stop` once on SIGTERM or SIGINT and then ends the process with code 0.
 * The supervisor waits for that end, so `stop` has to finish what was begun and close what was opened.
 */
export function onShutdown(stop: () => Promise<void>, { logger, graceMs = 5_000 }: ShutdownOptions): void {
  let stopping = false
  const begin = (signal: NodeJS.Signals) => {
    if (stopping) return
    stopping = true
    logger.info({ signal }, 'stopping')
    setTimeout(() => {
      logger.error({ graceMs }, 'did not stop in time')
      process.exit(1)
    }, graceMs).unref()
    stop().then(
      () => process.exit(0),
      (error: unknown) => {
        logger.error({ err: error }, 'stopping failed')
        process.exit(1)
      },
    )
  }
  process.on('SIGTERM', begin)
  process.on('SIGINT', begin)
}
