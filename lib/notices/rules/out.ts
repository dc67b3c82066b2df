import type { Episode, NewNotice, NoticeCarry, NoticeInputs, RulePart } from '../inputs'
import type { Rule } from '../notice'
import { recipients, planners } from '../people'
import { warnBeforeEarlyEdgeMs } from '../policy'
import { moreLikelyGood, nearlyOutTitle, tightLidCaution, timeOutTitle } from '../wording'

/** A piece that is out: told before its early edge and at it, each once for one outing. */
export function outCarry(now: number, inputs: NoticeInputs, carry: NoticeCarry): RulePart {
  const parts = carry.pieces.map(({ outAt, ...piece }): RulePart => {
    const { check } = piece
    if (outAt === null || check?.kind !== 'verdict' || check.earlyAt === null)
      return { episodes: [], notices: [] }
    const earlyAt = new Date(check.earlyAt)
    const isOver = now >= earlyAt.getTime()
    const warnAt = earlyAt.getTime() - warnBeforeEarlyEdgeMs(earlyAt.getTime() - outAt)
    if (now < warnAt) return { episodes: [], notices: [] }
    const rule: Rule = isOver ? 'time-out' : 'time-nearly-out'
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
      to: recipients(planners(inputs.people, carry), isOver && piece.stage === 'box'),
    }
    return { episodes: [episode], notices: [notice] }
  })
  return { episodes: parts.flatMap((part) => part.episodes), notices: parts.flatMap((part) => part.notices) }
}
