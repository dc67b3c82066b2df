import { leastUsefulStayMs } from '@/lib/notices/policy'
import type { JointFacts } from './joint-defaults'
import { type SteadyAir, steadyCarry } from './steady-carry'

/** What can be said of a piece the moment its first answers are given, were it to go to another room now. */
export type FirstAnswer =
  | { readonly kind: 'keeps' }
  | { readonly kind: 'keep-short' | 'leave'; readonly minutesEarly: number; readonly minutes: number }

/**
 * The first answer about a new piece: how long it may go to another room, open in work, in the air as it is now.
 * @param here  air of the room that it is in, which its joint is taken to have been cut in; °C (-10 to 50) and % RH
 * @param there air of the room that it would go to
 * @returns undefined while there is no joint to work out; the real check, with its history, comes with the carry
 *
 * Source: `steadyCarry`; the least useful stay by the policy.
 */
export function firstAnswer(here: SteadyAir, there: SteadyAir, facts: JointFacts): FirstAnswer | undefined {
  const timeOut = steadyCarry(here, there, facts)?.timeOut
  if (timeOut === undefined) return undefined
  if (!timeOut.binds) return { kind: 'keeps' }
  const { minutesEarly, minutes } = timeOut
  const kind = minutesEarly * 60_000 >= leastUsefulStayMs ? 'keep-short' : 'leave'
  return { kind, minutesEarly, minutes }
}
