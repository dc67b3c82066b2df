import { setTimeout as delay } from 'node:timers/promises'

/**
 * Asks until there is an answer other than undefined or false, and gives it. Fails with `what` when the deadline has passed.
 * Tests wait for what they expect; they never sleep for a time that is hoped to be long enough.
 */
export async function eventually<T>(
  what: string,
  ask: () => Promise<T | undefined | false> | T | undefined | false,
  deadlineMs = 10_000,
): Promise<T> {
  const end = performance.now() + deadlineMs
  for (;;) {
    const answer = await ask()
    if (answer !== undefined && answer !== false) return answer
    if (performance.now() >= end) throw new Error(`Within ${deadlineMs} ms this did not happen: ${what}`)
    await delay(25)
  }
}
