import { askedFirst, followUps, houseListRest } from '../asking'
import type { Episode, NewNotice, NoticeCarry, NoticeInputs, NoticeState, RulePart } from '../inputs'
import type { Rule } from '../notice'
import { recipients } from '../people'
import { warnBeforeEarlyEdgeMs } from '../policy'
import { choiceOf, isRuleOn } from '../rule-settings'
import { moreLikelyGood, nearlyOutTitle, tightLidCaution, timeOutTitle } from '../wording'

const minuteMs = 60_000

/**
 * A piece that is out: told before its early edge and at it, each once for one outing; after it, what was answered
 * decides who is told next.
 */
export function outCarry(
  now: number,
  state: NoticeState,
  inputs: NoticeInputs,
  carry: NoticeCarry,
): RulePart {
  const nearly = choiceOf(inputs.rules, 'time-nearly-out').values
  const over = choiceOf(inputs.rules, 'time-out').values
  const parts = carry.pieces.map(({ outAt, ...piece }): RulePart => {
    const { check } = piece
    if (outAt === null || check?.kind !== 'verdict' || check.earlyAt === null)
      return { episodes: [], notices: [] }
    const earlyAt = new Date(check.earlyAt)
    const isOver = now >= earlyAt.getTime()
    const warnAt =
      earlyAt.getTime() -
      warnBeforeEarlyEdgeMs(earlyAt.getTime() - outAt, nearly.leastMin * minuteMs, nearly.mostMin * minuteMs)
    const rule: Rule = isOver ? 'time-out' : 'time-nearly-out'
    if (now < warnAt || !isRuleOn(inputs.rules, rule)) return { episodes: [], notices: [] }
    const at = new Date(now)
    const { timeZone } = inputs.site
    const episode: Episode = {
      rule,
      subject: `piece ${piece.code}`,
      key: new Date(outAt).toISOString(),
      state: 'telling',
      beganAt: isOver ? earlyAt.getTime() : warnAt,
    }
    const told = { ...piece, outAt }
    const notice: NewNotice = {
      key: `${rule}/${carry.code}/${piece.code}/${episode.key}`,
      rule,
      urgency: 'now',
      mark: isOver ? 'leave' : 'keep-short',
      title: isOver ? timeOutTitle(told, earlyAt, timeZone, at) : nearlyOutTitle(told, earlyAt, timeZone),
      body: [moreLikelyGood(check, timeZone, at), tightLidCaution].filter(Boolean).join(' '),
      link: `/carry/${carry.code}`,
      episode,
      carryCode: carry.code,
      pieceCode: piece.code,
      // Of all that may happen at night, only a finished box past its time is worth waking its maker for.
      to: recipients(
        askedFirst(inputs.people, carry),
        isOver && piece.stage === 'box' && over.wakes === 'box',
      ),
    }
    const ask = {
      base: notice,
      askKey: `bring-in/${carry.code}/${piece.code}/${episode.key}`,
      episode,
      rest: houseListRest(inputs.people, carry),
      restAfterMs: isOver ? over.restAfterMin * minuteMs : null,
    }
    return { episodes: [episode], notices: [notice, ...followUps(now, state, inputs.people, ask)] }
  })
  return { episodes: parts.flatMap((part) => part.episodes), notices: parts.flatMap((part) => part.notices) }
}
