const codeOf = (error: unknown): string | undefined => {
  if (typeof error !== 'object' || error === null || !('code' in error)) return undefined
  return typeof error.code === 'string' ? error.code : undefined
}

/**
 * Whether a failed write lies in what was written. Everything else (the database away, full, stopping, out of
 * memory, waiting too long) passes, and the same write is tried again.
 */
export function isFaultOfData(error: unknown): boolean {
  // A mistake of ours shows on the data that brings it about; the rest must not wait for it for ever.
  if (error instanceof TypeError || error instanceof RangeError) return true
  const code = codeOf(error)
  if (code === undefined || !/^[0-9A-Z]{5}$/.test(code)) return false
  if (code.startsWith('22')) return true
  // 23503: a sensor was deleted meanwhile; the next try leaves it out.
  if (!code.startsWith('23') || code === '23503') return false
  return !isMissingMonth(error)
}

/** A reading found no month to go to: PostgreSQL says so as a check that no constraint is named for. */
export function isMissingMonth(error: unknown): boolean {
  if (codeOf(error) !== '23514') return false
  return !(error instanceof Error && 'constraint' in error && typeof error.constraint === 'string')
}
