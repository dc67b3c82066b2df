import { losingFitClearPct } from '../policy'
import { grouped } from '../grouped'
import type { NoticeInputs, NoticeState, RulePart } from '../inputs'
import type { Rule } from '../notice'
import { makers, recipients } from '../people'
import { choiceOf, isInScope, isRuleOn } from '../rule-settings'
import type { NoticeBlank, RestingBox } from '../surroundings'
import { listed, tightLidCaution } from '../wording'

const dayMs = 24 * 3_600_000
const nothing: RulePart = { episodes: [], notices: [] }

/** Finished boxes that lose their fit where they stand, as the season turns: together, weekly at most. */
export function losingFit(now: number, state: NoticeState, inputs: NoticeInputs): RulePart {
  const { values, isOn } = choiceOf(inputs.rules, 'losing-fit')
  if (!isOn) return nothing
  const open = new Set(
    (state.known ?? [])
      .filter((one) => one.rule === 'losing-fit' && one.isOpen)
      .map(({ subject }) => subject),
  )
  const boxes = (inputs.surroundings?.boxes ?? [])
    .map((box) => ({ ...box, subject: `piece ${box.code}` }))
    .filter((box) => {
      const limit = values.usedPct - (open.has(box.subject) ? losingFitClearPct : 0)
      return isInScope(values.rooms, box.roomCode, true) && box.used * 100 >= limit
    })
  const { episodes, toTell } = grouped(now, state, 'losing-fit', boxes, values.everyDays * dayMs)
  if (toTell.length === 0) return { episodes, notices: [] }
  const [first] = toTell
  const isOne = toTell.length === 1
  return {
    episodes,
    notices: [
      {
        ...groupNotice('losing-fit', toTell, episodes),
        urgency: 'whenever',
        mark: 'keep-short',
        title: `${numbersOf(toTell)} ${isOne ? 'is' : 'are'} losing ${isOne ? 'its' : 'their'} fit where ${isOne ? 'it stands' : 'they stand'}.`,
        body: `${placesOf(toTell)} The wood follows the season: a quarter turn may feel tight, or rattle. Move ${isOne ? 'it' : 'them'} to air like that in which the joint was cut. ${tightLidCaution}`,
        link: isOne && first !== undefined ? `/pieces/${first.code}` : '/pieces',
        ...(isOne && first !== undefined ? { pieceCode: first.code } : {}),
        to: recipients(makers(inputs.people)),
      },
    ],
  }
}

const numbersOf = (pieces: readonly { number: string }[]): string =>
  listed(pieces.map(({ number }) => number))

/** "207 in Study has used about nine tenths of its allowance." */
function placesOf(boxes: readonly RestingBox[]): string {
  return boxes
    .map(
      ({ number, roomName, used }) =>
        `${number} in ${roomName} has used ${used >= 1 ? 'all of its allowance' : `about ${String(Math.round(used * 10))} tenths of its allowance`}.`,
    )
    .join(' ')
}

/** Blanks that are ready: each told once for its series of weights. */
export function blankReady(now: number, state: NoticeState, inputs: NoticeInputs): RulePart {
  const { values, isOn } = choiceOf(inputs.rules, 'blank-ready')
  if (!isOn) return nothing
  const ready = blanksOf(inputs, values.rooms).filter(({ isReady }) => isReady)
  const subjects = ready.map((blank) => ({
    ...blank,
    subject: `piece ${blank.code}`,
    key: `series ${blank.seriesKey}`,
  }))
  const { episodes, toTell } = grouped(now, state, 'blank-ready', subjects, 0)
  if (toTell.length === 0) return { episodes, notices: [] }
  const isOne = toTell.length === 1
  const byWeight = toTell.filter(({ isByWeightAlone }) => isByWeightAlone)
  return {
    episodes,
    notices: [
      {
        ...groupNotice('blank-ready', toTell, episodes),
        urgency: 'whenever',
        mark: 'fine',
        title: `${isOne ? 'Blank' : 'Blanks'} ${numbersOf(toTell)} ${isOne ? 'is' : 'are'} ready to finish.`,
        body:
          byWeight.length === 0
            ? 'The weights have stood still and the wood is about where its keep room has its middle. Test the fit before the last cut all the same.'
            : `${numbersOf(byWeight)}: by weight alone, as you asked. Test the fit before the last cut all the same.`,
        ...linkOf(toTell),
        to: recipients(makers(inputs.people)),
      },
    ],
  }
}

/** Blanks whose weighing is due, all together. */
export function weighingDue(now: number, state: NoticeState, inputs: NoticeInputs): RulePart {
  const { values, isOn } = choiceOf(inputs.rules, 'weighing-due')
  if (!isOn) return nothing
  const due = blanksOf(inputs, values.rooms).filter(
    ({ isReady, weighingDueAt }) => !isReady && weighingDueAt <= now,
  )
  const subjects = due.map((blank) => ({
    ...blank,
    subject: `piece ${blank.code}`,
    key: new Date(blank.weighingDueAt).toISOString(),
  }))
  const { episodes, toTell } = grouped(now, state, 'weighing-due', subjects, values.everyDays * dayMs)
  if (toTell.length === 0) return { episodes, notices: [] }
  const isOne = toTell.length === 1
  return {
    episodes,
    notices: [
      {
        ...groupNotice('weighing-due', toTell, episodes),
        urgency: 'whenever',
        mark: 'weigh',
        title: `${numbersOf(toTell)} ${isOne ? 'is' : 'are'} due to be weighed.`,
        body: 'Each weight on the same scale makes the resting curve surer.',
        ...linkOf(toTell),
        to: recipients(makers(inputs.people)),
      },
    ],
  }
}

const blanksOf = (inputs: NoticeInputs, rooms: readonly string[]): NoticeBlank[] =>
  (inputs.surroundings?.blanks ?? []).filter((blank) => isInScope(rooms, blank.roomCode, true))

function linkOf(pieces: readonly { code: string }[]): { link: string; pieceCode?: string } {
  const [first] = pieces
  return pieces.length === 1 && first !== undefined
    ? { link: `/pieces/${first.code}`, pieceCode: first.code }
    : { link: '/pieces' }
}

/** One notice for several pieces hangs on the episode of the first; its key holds them all. */
export function groupNotice(
  rule: Rule,
  told: readonly { subject: string }[],
  episodes: RulePart['episodes'],
): { key: string; rule: Rule; episode: { rule: Rule; subject: string; key: string } } {
  const own = episodes.filter(({ subject }) => told.some((one) => one.subject === subject))
  const subject = told[0]?.subject ?? ''
  return {
    key: `${rule}/${own.map((one) => `${one.subject} ${one.key}`).join('/')}`,
    rule,
    episode: { rule, subject, key: own.find((one) => one.subject === subject)?.key ?? '' },
  }
}

/** Whether a rule has anything to look at; saves the loader a costly look. */
export const wantsPieces = (inputs: Pick<NoticeInputs, 'rules'>): { boxes: boolean; blanks: boolean } => ({
  boxes: isRuleOn(inputs.rules, 'losing-fit'),
  blanks: isRuleOn(inputs.rules, 'blank-ready') || isRuleOn(inputs.rules, 'weighing-due'),
})
