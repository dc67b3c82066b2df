import type { Decision, NoticeInputs, NoticeState } from './inputs'
import { deliveriesOf } from './routing'
import { evening } from './rules/evening'
import { outCarry } from './rules/out'
import { plannedCarry } from './rules/planned'
import { silent } from './rules/silent'

/**
 * What the product tells, and to whom, at one moment: a pure function of the moment, of what was told before, and of
 * how things stand. Called again with the same it tells nothing new, whoever calls it and however often.
 */
export function decideNotices(now: number, state: NoticeState, inputs: NoticeInputs): Decision {
  const parts = [
    ...inputs.carries
      .filter((carry) => carry.state === 'planned')
      .map((carry) => plannedCarry(now, state, inputs, carry)),
    ...inputs.carries.filter((carry) => carry.state === 'out').map((carry) => outCarry(now, inputs, carry)),
    evening(now, inputs),
    silent(now, inputs),
  ]
  return {
    episodes: parts.flatMap((part) => part.episodes),
    notices: parts
      .flatMap((part) => part.notices)
      .filter((notice) => !state.told.has(notice.key))
      .map((notice) => ({ ...notice, deliveries: deliveriesOf(now, notice, inputs) })),
  }
}
