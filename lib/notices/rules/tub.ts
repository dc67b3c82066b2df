import { formatTemperature } from '@/lib/format/figures'
import { followUps } from '../asking'
import type { Episode, NewNotice, NoticeInputs, NoticeState, RulePart } from '../inputs'
import { houseList, makers, recipients } from '../people'
import { roomHysteresisPct } from '../policy'
import { choiceOf } from '../rule-settings'
import type { NoticeTub } from '../surroundings'

const nothing: RulePart = { episodes: [], notices: [] }
/** House and shop closer than this can't be told apart by a tub, K. A guess. */
const apartK = 4
const hourMs = 3_600_000

/** A tub that feels as if it had been carried out, with no carry to say so: asked once, until it is warm again. */
export function tubOut(now: number, state: NoticeState, inputs: NoticeInputs): RulePart {
  const { values, isOn } = choiceOf(inputs.rules, 'tub-out')
  if (!isOn) return nothing
  const parts = (inputs.surroundings?.tubs ?? []).map((tub): RulePart => {
    const subject = `room ${tub.roomCode}`
    const open = (state.known ?? []).find(
      (one) => one.rule === 'tub-out' && one.subject === subject && one.isOpen,
    )
    const seen = lookAt(now, tub, values.fallK, open !== undefined)
    if (tub.isLoggedOut || seen === undefined) return nothing
    const episode: Episode = {
      rule: 'tub-out',
      subject,
      key: open?.key ?? new Date(seen.since).toISOString(),
      state: 'telling',
      beganAt: open?.beganAt ?? seen.since,
    }
    const notice: NewNotice = {
      key: `tub-out/${tub.roomCode}/${episode.key}`,
      rule: 'tub-out',
      urgency: 'now',
      mark: 'unknown',
      title: `Is ${tub.roomName} out? It has turned cold.`,
      body: `${seen.words} If pieces are out in it, say which: their time counts from then. A shut tub slows the air and does not stop it.`,
      link: '/carry',
      episode,
      roomCode: tub.roomCode,
      to: recipients([...makers(inputs.people), ...houseList(inputs.people)]),
    }
    const ask = { base: notice, askKey: notice.key, episode, rest: [], restAfterMs: null }
    return { episodes: [episode], notices: [notice, ...followUps(now, state, inputs.people, ask)] }
  })
  return {
    episodes: parts.flatMap((part) => part.episodes),
    notices: parts.flatMap((part) => part.notices),
  }
}

/** Since when it seems to be out, and why; undefined when it seems to be in, or nobody knows. */
function lookAt(
  now: number,
  tub: NoticeTub,
  fallK: number,
  isAsked: boolean,
): { since: number; words: string } | undefined {
  const recent = tub.readings.filter(({ at }) => at <= now && at >= now - hourMs)
  const last = recent.at(-1)
  if (last === undefined) return undefined
  const { shopC, houseC, usualC } = tub
  const warmest = recent.reduce((best, one) => (one.temperatureC > best.temperatureC ? one : best), last)
  const at = formatTemperature(last.temperatureC)
  if (warmest.temperatureC - last.temperatureC >= fallK)
    return {
      since: warmest.at,
      words: `It fell from ${formatTemperature(warmest.temperatureC)} to ${at} within the hour.`,
    }
  // By where it stands: only for a tub that is at home in the house, and only where the two are well apart.
  if (shopC === null || houseC === null || houseC - shopC < apartK) return undefined
  const middleC = (houseC + shopC) / 2
  const livesInHouse = usualC === null || usualC > middleC
  const backAtC = middleC + (isAsked ? roomHysteresisPct : 0)
  if (!livesInHouse || last.temperatureC >= backAtC) return undefined
  return { since: last.at, words: `At ${at} it is nearer to the shop than to the house.` }
}
