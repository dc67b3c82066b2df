import type { Decision, NoticeInputs, NoticeState, RulePart } from './inputs'
import { deliveriesOf } from './routing'
import { coldIron } from './rules/cold-iron'
import { damperThanNormal } from './rules/damper-than-normal'
import { evening } from './rules/evening'
import { keepRoomBand } from './rules/keep-room-band'
import { mouldRisk } from './rules/mould-risk'
import { outCarry } from './rules/out'
import { blankReady, losingFit, weighingDue } from './rules/pieces'
import { plannedCarry } from './rules/planned'
import { batteryLow, refusedMessages } from './rules/sensors'
import { goodHours, shopUnfit } from './rules/shop-hours'
import { silent } from './rules/silent'
import { tooDry } from './rules/too-dry'
import { tubOut } from './rules/tub'

/**
 * What the product tells, and to whom, at one moment: a pure function of the moment, of what was told before, and of
 * how things stand. Called again with the same it tells nothing new, whoever calls it and however often.
 */
export function decideNotices(now: number, state: NoticeState, inputs: NoticeInputs): Decision {
  const band = keepRoomBand(now, state, inputs)
  const parts = [
    ...inputs.carries
      .filter((carry) => carry.state === 'planned')
      .map((carry) => plannedCarry(now, state, inputs, carry)),
    ...inputs.carries
      .filter((carry) => carry.state === 'out')
      .map((carry) => outCarry(now, state, inputs, carry)),
    evening(now, state, inputs),
    tubOut(now, state, inputs),
    silent(now, inputs),
    batteryLow(now, state, inputs),
    refusedMessages(now, state, inputs),
    band,
    damperThanNormal(now, state, inputs, roomsTold(band)),
    mouldRisk(now, state, inputs),
    tooDry(now, state, inputs),
    coldIron(now, state, inputs),
    shopUnfit(now, state, inputs),
    goodHours(now, state, inputs),
    losingFit(now, state, inputs),
    blankReady(now, state, inputs),
    weighingDue(now, state, inputs),
  ]
  return {
    episodes: parts.flatMap((part) => part.episodes),
    notices: parts
      .flatMap((part) => part.notices)
      .filter((notice) => !state.told.has(notice.key))
      .map((notice) => ({ ...notice, deliveries: deliveriesOf(now, notice, inputs) })),
  }
}

/** Rooms of which a part tells, by their codes. */
const roomsTold = (part: RulePart): ReadonlySet<string> =>
  new Set(
    part.episodes
      .filter(({ state }) => state === 'telling')
      .map(({ subject }) => subject.replace(/^room /, '')),
  )
