import { dayOfInstant, daysAfter } from '@/lib/climate/days'
import { instantOfLocalTime } from '@/lib/sites/local-time'
import type { Episode, NewNotice, NoticeInputs, RulePart } from '../inputs'
import type { Rule } from '../notice'
import { houseList, recipients, makers } from '../people'
import { lastCallBeforeQuietMs } from '../policy'
import { latheCaution, listed } from '../wording'

/** The evening question: what is still out? Asked at lock-up, and once more before quiet hours. */
export function evening(now: number, inputs: NoticeInputs): RulePart {
  const { timeZone, lockUpAt, quietFrom, quietTo } = inputs.site
  const stillOut = inputs.carries
    .filter((carry) => carry.state === 'out')
    .flatMap((carry) => carry.pieces.filter((piece) => piece.outAt !== null).map((piece) => piece.number))
  if (stillOut.length === 0) return { episodes: [], notices: [] }
  const today = dayOfInstant(new Date(now), timeZone)
  const lockUp = instantOfLocalTime(today, lockUpAt, timeZone)
  const midnight = instantOfLocalTime(daysAfter(today, 1), '00:00', timeZone)
  const hasQuiet = quietFrom !== quietTo && quietFrom > lockUpAt
  const quiet = hasQuiet ? instantOfLocalTime(today, quietFrom, timeZone) : midnight
  if (now < lockUp || now >= quiet) return { episodes: [], notices: [] }
  const isLastCall = hasQuiet && now >= quiet - lastCallBeforeQuietMs
  const rule: Rule = isLastCall ? 'last-call' : 'lock-up'
  const episode: Episode = {
    rule,
    subject: 'site',
    key: today,
    state: 'telling',
    beganAt: isLastCall ? quiet - lastCallBeforeQuietMs : lockUp,
  }
  const asks = isLastCall ? 'Last call' : 'Lock-up'
  const notice: NewNotice = {
    key: `${rule}/${today}`,
    rule,
    urgency: 'now',
    mark: 'keep-short',
    title: `${asks}: still out: ${listed(stillOut)}.`,
    body: `One night out there can undo a year of waiting. Bring ${stillOut.length === 1 ? 'it' : 'them'} in, or say that ${stillOut.length === 1 ? 'it is' : 'they are'} in already. ${latheCaution}`,
    link: '/carry',
    episode,
    to: recipients([...makers(inputs.people), ...houseList(inputs.people)]),
  }
  return { episodes: [episode], notices: [notice] }
}
