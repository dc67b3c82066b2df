import { setTimeout as delay } from 'node:timers/promises'

export interface WaitOptions {
  deadlineMs: number
  stepMs?: number
  /** Ends the waiting early, with the answer false. */
  signal?: AbortSignal
}

/** Asks again until the answer is yes; false when the deadline has passed or the signal came. */
export async function waitUntil(
  ask: () => Promise<boolean>,
  { deadlineMs, stepMs = 100, signal }: WaitOptions,
): Promise<boolean> {
  const end = performance.now() + deadlineMs
  while (!signal?.aborted) {
    if (await ask()) return true
    if (performance.now() >= end) return false
    await delay(stepMs)
  }
  return false
}
