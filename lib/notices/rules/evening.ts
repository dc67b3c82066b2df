import { dayOfInstant, daysAfter } from '@/lib/climate/days'
import { formatMoment } from '@/lib/format/times'
import { instantOfLocalTime } from '@/lib/sites/local-time'
import { answersOf, askedFirst, followUps, houseListRest } from '../asking'
import type { Episode, NewNotice, NoticeInputs, NoticeState, RulePart } from '../inputs'
import type { Rule } from '../notice'
import { houseList, recipients, makers } from '../people'
import { choiceOf, isRuleOn } from '../rule-settings'
import { shopUseWords } from '../shop-used'
import { latheCaution, listed } from '../wording'

const minuteMs = 60_000
const nothing: RulePart = { episodes: [], notices: [] }

/** The evening question: what is still out? Asked at lock-up, and once more before quiet hours. */
export function evening(now: number, state: NoticeState, inputs: NoticeInputs): RulePart {
  const stillOut = inputs.carries
    .filter((carry) => carry.state === 'out')
    .flatMap((carry) => carry.pieces.filter((piece) => piece.outAt !== null).map((piece) => piece.number))
  const hours = eveningHours(now, inputs)
  if (now < hours.lockUp || now >= hours.end) return askedLater(now, state, inputs, hours, stillOut)
  const isLastCall = hours.lastCall !== null && now >= hours.lastCall
  if (stillOut.length === 0) return isLastCall ? nothing : anythingOut(now, state, inputs, hours)
  const rule: Rule = isLastCall ? 'last-call' : 'lock-up'
  if (!isRuleOn(inputs.rules, rule)) return nothing
  const episode: Episode = {
    rule,
    subject: 'site',
    key: hours.today,
    state: 'telling',
    beganAt: hours.lastCall !== null && isLastCall ? hours.lastCall : hours.lockUp,
  }
  const isOne = stillOut.length === 1
  const overNight = isLastCall
    ? ` Else ${isOne ? 'it stays' : 'they stay'} out until ${formatMoment(new Date(quietEnd(hours, inputs)), inputs.site.timeZone, new Date(now))}, and nobody is told before that.`
    : ''
  const notice: NewNotice = {
    key: `${rule}/${hours.today}`,
    rule,
    urgency: 'now',
    mark: 'keep-short',
    title: `${isLastCall ? 'Last call' : 'Lock-up'}: still out: ${listed(stillOut)}.`,
    body: `One night out there can undo a year of waiting. Bring ${isOne ? 'it' : 'them'} in, or say that ${isOne ? 'it is' : 'they are'} in already.${overNight} ${latheCaution}`,
    link: '/lock-up',
    episode,
    to: recipients(
      isLastCall ? [...makers(inputs.people), ...houseList(inputs.people)] : eveningFirst(inputs),
    ),
  }
  return { episodes: [episode], notices: [notice, ...eveningFollowUps(now, state, inputs, notice, episode)] }
}

/** Whoever said "later" in the evening, with an hour outside it, is asked at that hour what is still out. */
function askedLater(
  now: number,
  state: NoticeState,
  inputs: NoticeInputs,
  { today }: EveningHours,
  stillOut: string[],
): RulePart {
  const later = (state.answers ?? []).filter(
    ({ subject, answer, until }) =>
      subject === 'site' &&
      answer === 'later' &&
      until !== null &&
      now >= until &&
      dayOfInstant(new Date(until), inputs.site.timeZone) === today,
  )
  const to = inputs.people.filter(({ userId }) => later.some((answer) => answer.userId === userId))
  if (stillOut.length === 0 || to.length === 0 || !isRuleOn(inputs.rules, 'lock-up')) return nothing
  const episode: Episode = {
    rule: 'lock-up',
    subject: 'site',
    key: `${today}/later`,
    state: 'telling',
    beganAt: Math.min(...later.map(({ until }) => until ?? now)),
  }
  const isOne = stillOut.length === 1
  const notice: NewNotice = {
    key: `lock-up/${episode.key}`,
    rule: 'lock-up',
    urgency: 'now',
    mark: 'keep-short',
    title: `Still out: ${listed(stillOut)}.`,
    body: `You asked to be asked again. Bring ${isOne ? 'it' : 'them'} in, or say that ${isOne ? 'it is' : 'they are'} in already. ${latheCaution}`,
    link: '/lock-up',
    episode,
    to: recipients(to),
  }
  return { episodes: [episode], notices: [notice] }
}

/**
 * With nothing logged out: asked on days when the shop was used and nothing was logged that accounts for it, until
 * somebody says "nothing". Where carries were logged and all are back, the log has answered already.
 */
function anythingOut(now: number, state: NoticeState, inputs: NoticeInputs, hours: EveningHours): RulePart {
  const { isOn, values } = choiceOf(inputs.rules, 'lock-up')
  const facts = inputs.surroundings?.evening
  if (!isOn || facts === undefined || facts.isAnswered || values.whenNothing === 'never') return nothing
  const isAccountedFor = facts.shopUse === null || facts.shopUse === 'carried'
  if (isAccountedFor && values.whenNothing !== 'daily') return nothing
  const episode: Episode = {
    rule: 'lock-up',
    subject: 'site',
    key: `${hours.today}/anything`,
    state: 'telling',
    beganAt: hours.lockUp,
  }
  const isClosed = answersOf(state, episode).some(({ answer }) => answer === 'nothing' || answer === 'in')
  if (isClosed) return nothing
  const why = facts.shopUse === null ? '' : `${shopUseWords[facts.shopUse]} `
  const notice: NewNotice = {
    key: `lock-up/${episode.key}`,
    rule: 'lock-up',
    urgency: 'now',
    mark: 'unknown',
    title: 'Lock-up: anything still out? Nothing is logged out.',
    body: `${why}One night out there can undo a year of waiting. Look round the bench, the lathe and the van, or say that nothing is. ${latheCaution}`,
    link: '/lock-up',
    episode,
    to: recipients(eveningFirst(inputs)),
  }
  return { episodes: [episode], notices: [notice, ...eveningFollowUps(now, state, inputs, notice, episode)] }
}

/** Every maker, and the first of the house list. */
const eveningFirst = (inputs: NoticeInputs) => askedFirst(inputs.people)

function eveningFollowUps(
  now: number,
  state: NoticeState,
  inputs: NoticeInputs,
  base: NewNotice,
  episode: Episode,
): NewNotice[] {
  const { restAfterMin } = choiceOf(inputs.rules, 'lock-up').values
  return followUps(now, state, inputs.people, {
    base,
    askKey: `evening/${episode.key}`,
    episode,
    rest: base.rule === 'lock-up' ? houseListRest(inputs.people) : [],
    restAfterMs: base.rule === 'lock-up' ? restAfterMin * minuteMs : null,
  })
}

interface EveningHours {
  today: string
  lockUp: number
  /** Null without quiet hours that follow lock-up. */
  lastCall: number | null
  /** Quiet hours, or midnight. */
  end: number
}

/** The moments of this evening by the clocks of the site; a change of the clocks moves them with the clocks. */
export function eveningHours(now: number, inputs: Pick<NoticeInputs, 'site' | 'rules'>): EveningHours {
  const { timeZone, lockUpAt, quietFrom, quietTo } = inputs.site
  const { beforeMin } = choiceOf(inputs.rules, 'last-call').values
  const today = dayOfInstant(new Date(now), timeZone)
  const lockUp = instantOfLocalTime(today, lockUpAt, timeZone)
  const midnight = instantOfLocalTime(daysAfter(today, 1), '00:00', timeZone)
  const hasQuiet = quietFrom !== quietTo && quietFrom > lockUpAt
  const quiet = instantOfLocalTime(today, quietFrom, timeZone)
  return {
    today,
    lockUp,
    lastCall: hasQuiet ? Math.max(lockUp, quiet - beforeMin * minuteMs) : null,
    end: hasQuiet ? quiet : midnight,
  }
}

function quietEnd({ today, end }: EveningHours, { site }: NoticeInputs): number {
  const sameDay = instantOfLocalTime(today, site.quietTo, site.timeZone)
  return sameDay > end ? sameDay : instantOfLocalTime(daysAfter(today, 1), site.quietTo, site.timeZone)
}
