import { dayOfInstant, daysAfter } from '@/lib/climate/days'
import { instantOfLocalTime } from '@/lib/sites/local-time'
import {
  type Episode,
  type NewNotice,
  type NoticeCarry,
  type NoticeInputs,
  type NoticeState,
  type RulePart,
  severities,
  type Severity,
} from '../inputs'
import { recipients, planners } from '../people'
import { planLapsesMs } from '../policy'
import { choiceOf, isRuleOn } from '../rule-settings'
import { nextVerdictHold } from '../verdict-hold'
import { plannedBody, plannedTitle, severityOf } from '../wording'

/**
 * A planned carry that should not be made as planned: told the evening before and an hour before, each once, and
 * again when its verdict has worsened since it was told. A short one that was told of in the evening, and is planned to
 * be back by its early edge, is not told of once more.
 */
export function plannedCarry(
  now: number,
  state: NoticeState,
  inputs: NoticeInputs,
  carry: NoticeCarry,
): RulePart {
  if (now > carry.plannedAt + planLapsesMs) return { episodes: [], notices: [] }
  const { values } = choiceOf(inputs.rules, 'planned-carry')
  const { timeZone } = inputs.site
  const subject = `carry ${carry.code}`
  const occasion = new Date(carry.plannedAt).toISOString()
  const hold = nextVerdictHold(state.holds.get(`${subject} ${occasion}`), {
    severity: worstOf(carry),
    now,
    airAt: carry.airAt,
  })
  const eveningBefore = instantOfLocalTime(
    daysAfter(dayOfInstant(new Date(carry.plannedAt), timeZone), -1),
    values.eveningAt,
    timeZone,
  )
  const moment =
    now >= carry.plannedAt - values.beforeMin * 60_000 ? 'hour' : now >= eveningBefore ? 'evening' : null
  const keyOf = (of: 'hour' | 'evening' | null) => `planned-carry/${carry.code}/${occasion}/${of ?? ''}`
  const key = keyOf(moment)
  const isHeeded =
    moment === 'hour' && state.told.has(keyOf('evening')) && hold.held === 'keep-short' && endsInTime(carry)
  const momentIsNew = moment !== null && !state.told.has(key) && !isHeeded
  const isBad = severities[hold.held] > 0
  const isWorse = moment !== null && severities[hold.held] > severities[hold.told]
  const tells = isBad && (momentIsNew || isWorse)

  // The two rules share what was told: with one of them off, the other goes on as if it had spoken.
  const isFirstWord = isRuleOn(inputs.rules, 'planned-carry') || hold.told === 'fine'
  const rule = momentIsNew && isFirstWord ? 'planned-carry' : 'verdict-worse'
  const episode: Episode = {
    rule: 'planned-carry',
    subject,
    key: occasion,
    state: isBad && moment !== null && isRuleOn(inputs.rules, 'planned-carry') ? 'telling' : 'pending',
    beganAt: now,
    hold: tells ? { ...hold, told: hold.held } : hold,
  }
  if (!tells || (rule === 'verdict-worse' && !isWorse) || !isRuleOn(inputs.rules, rule))
    return { episodes: [episode], notices: [] }
  const at = new Date(now)
  const notice: NewNotice = {
    key: rule === 'planned-carry' ? key : `verdict-worse/${carry.code}/${occasion}/${hold.held}`,
    rule,
    urgency: 'soon',
    mark: hold.held,
    title: plannedTitle(carry, timeZone, at),
    body: plannedBody(carry),
    link: `/carry/${carry.code}`,
    episode,
    carryCode: carry.code,
    to: recipients(planners(inputs.people, carry)),
  }
  return { episodes: [episode], notices: [notice] }
}

/** Whether every piece is planned to be back by its early edge. */
const endsInTime = ({ pieces, plannedAt, stayMinutes }: NoticeCarry): boolean =>
  pieces.every(
    ({ check }) =>
      check?.kind !== 'verdict' ||
      check.earlyAt === null ||
      new Date(check.earlyAt).getTime() >= plannedAt + stayMinutes * 60_000,
  )

function worstOf(carry: NoticeCarry): Severity {
  return carry.pieces
    .map((piece) => severityOf(piece.check))
    .reduce<Severity>((worst, one) => (severities[one] > severities[worst] ? one : worst), 'fine')
}
