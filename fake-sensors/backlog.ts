/** How far back a simulated sensor remembers. What is older is lost, and stays a gap. */
export const BACKLOG_MOST_MS = 48 * 3_600_000

/**
 * The instants at which a sensor measured while its program was off.
 * @param lastAtMs instant of its last reading that was acknowledged
 * @param nowMs the present
 * @param everyMs distance of the readings that it kept
 * @returns epoch ms, oldest first, after the last one and before the present
 */
export function missedInstants(lastAtMs: number, nowMs: number, everyMs: number): number[] {
  const firstMs = Math.max(lastAtMs + everyMs, nowMs - BACKLOG_MOST_MS)
  const instants: number[] = []
  for (let atMs = firstMs; atMs < nowMs; atMs += everyMs) instants.push(Math.floor(atMs / 1000) * 1000)
  return instants
}
