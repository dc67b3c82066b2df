import { describe, expect, it } from 'vitest'
import type { Carry, CarryPiece } from '@/lib/carry/carry'
import type { PieceCheck } from '@/lib/carry/carry-check'
import { nowHeadline } from './headline'
import type { RuleRoom } from './now-view'

const now = new Date('2026-03-05T13:00:00Z')
const at = (clock: string) => `2026-03-05T${clock}:00.000Z`

const verdict = (grade: 'fine' | 'keep-short' | 'leave', earlyAt: string | null): PieceCheck => ({
  kind: 'verdict',
  verdict: grade,
  words: '',
  reason: '',
  second: '',
  earlyAt,
  middleAt: null,
  lateAt: null,
  ringMcPct: 9,
  lidMcPct: 9,
  mcDoubtPct: 0.5,
  cutMcPct: 8.5,
  thereEmcPct: 13.6,
  changePct: 1,
  allowedMcPct: 1.2,
  lossMm: 0.05,
  allowanceMm: 0.08,
  usedAtStart: 0,
  usedAtEnd: 0.6,
  curve: { at: [], usedEarly: [], used: [], usedLate: [] },
  assumed: [],
})
const unknown: PieceCheck = { kind: 'unknown', reason: 'no-reading', words: '', since: at('09:40') }
const threaded: PieceCheck = {
  kind: 'words',
  reason: 'threaded',
  words: "Threads aren't worked out.",
  second: '',
}

const piece = (number: string, check: PieceCheck | null, more: Partial<CarryPiece> = {}): CarryPiece => ({
  id: number,
  number,
  title: 'Ash box',
  outline: 'low',
  cover: 'open',
  fromRoom: null,
  outAt: at('12:00'),
  backAt: null,
  check,
  isOverdue: false,
  isAskSkipped: false,
  ...more,
})

const carry = (
  state: 'out' | 'planned',
  worst: Carry['worst'],
  pieces: CarryPiece[],
  plannedAt = at('14:00'),
): Carry => ({
  id: 'c',
  state,
  toRoom: { id: 's', name: 'the shop', mark: 1 },
  cover: 'open',
  plannedAt,
  stayMinutes: 60,
  startedAt: state === 'out' ? at('12:00') : null,
  endedAt: null,
  againstAdvice: false,
  note: '',
  by: null,
  pieces,
  headline: '',
  worst,
  version: 1,
  canUndo: false,
  takesWhatever: false,
  whatever: null,
  repeat: null,
  putOffFrom: null,
  betterAt: null,
  canPutBack: false,
})
const plan = (worst: Carry['worst'], check: PieceCheck, plannedAt?: string) =>
  carry('planned', worst, [piece('219', check, { outAt: null })], plannedAt)

const room = (name: string, emcPct: number | null, more: Partial<RuleRoom> = {}): RuleRoom => ({
  id: name,
  name,
  kind: 'house',
  mark: 0,
  isFocus: false,
  year: null,
  air:
    emcPct === null
      ? { kind: 'never' }
      : {
          kind: 'fresh',
          at: at('12:55'),
          ageS: 300,
          temperatureC: 20,
          humidityPct: 45,
          emcPct,
          emcDoubtPct: 0.5,
          dewPointC: null,
          isTyped: false,
          flags: [],
        },
  ...more,
})

function sentence(input: { out?: Carry[]; planned?: Carry[]; rooms?: RuleRoom[] }): string {
  const parts = nowHeadline({ out: [], planned: [], rooms: [], timeZone: 'Europe/London', now, ...input })
  return parts
    .map((part) => part.text)
    .join('')
    .replaceAll('\u00a0', ' ')
}

const house = room('Landing cupboard', 8.5, { isFocus: true })

describe('the sentence at the top of Now', () => {
  it('names what is overdue before anything else', () => {
    const overdue = piece('207', verdict('leave', at('12:40')), { isOverdue: true })
    const out = [carry('out', 'leave', [piece('211', verdict('keep-short', at('13:20'))), overdue])]
    expect(sentence({ out, planned: [plan('leave', verdict('leave', at('14:10')))] })).toBe(
      'Bring 207 in now: the time out in the shop was used up at 12:40.',
    )
  })

  it('then says what has to come in first, and how many more are out', () => {
    const out = [
      carry('out', 'keep-short', [
        piece('211', verdict('keep-short', at('15:20'))),
        piece('207', verdict('keep-short', at('13:35'))),
      ]),
    ]
    expect(sentence({ out })).toBe('Bring 207 in from the shop by 13:35; 1 more is out.')
  })

  it('tells of a plan for whatever is taken in its own words, and names no piece as if it were to go', () => {
    const whatever = {
      ...plan('leave', verdict('leave', at('14:10'))),
      takesWhatever: true,
      whatever: 'Whatever you take: at most until 15:30, judged by 214; leave 219.',
    }
    expect(sentence({ planned: [whatever] })).toBe(
      'Planned for the shop at 14:00. Whatever you take: at most until 15:30, judged by 214; leave 219.',
    )
  })

  it('says that nobody knows the air round what is out, rather than that all is well', () => {
    const out = [carry('out', 'unknown', [piece('207', unknown)])]
    expect(sentence({ out, rooms: [house] })).toBe(
      '207 is out and there is no reading from the shop since 09:40: look at the lid.',
    )
  })

  it('puts the plan that should not be carried out before one that may', () => {
    const planned = [
      plan('fine', verdict('fine', null), at('13:30')),
      plan('leave', verdict('leave', at('16:10')), at('16:00')),
    ]
    expect(sentence({ planned })).toBe(
      'Leave 219 where it is: planned for the shop at 16:00, the fit would not keep for long enough to be of use.',
    )
  })

  it('tells by when a planned piece has to be back', () => {
    expect(sentence({ planned: [plan('keep-short', verdict('keep-short', at('16:10')))] })).toBe(
      '219 may go to the shop at 14:00: back by 16:10.',
    )
  })

  it('gives a plan no green light without a fresh reading', () => {
    expect(sentence({ planned: [plan('unknown', unknown)] })).toBe(
      'No verdict for 219, planned for the shop at 14:00: no fresh reading there.',
    )
  })

  it('says that a fit is not worked out instead of that it keeps', () => {
    const out = [carry('out', 'words', [piece('207', threaded)])]
    expect(sentence({ out })).toBe('207 is out in the shop; its fit is not worked out.')
  })

  it('never says that nothing is out, only that nothing is logged out', () => {
    const cases = [
      { rooms: [] },
      { rooms: [room('Landing cupboard', null)] },
      { rooms: [house] },
      { rooms: [house, room('the shop', 13.6)] },
      { rooms: [house, room('the study', 8.9)] },
    ]
    const sentences = cases.map(sentence)
    for (const words of sentences) {
      expect(words).toMatch(/^Nothing is logged out\. /)
      expect(words).not.toMatch(/nothing is out/i)
    }
    expect(sentences[0]).toContain('Add a room')
    expect(sentences[1]).toContain('No room has been read yet')
    expect(sentences[2]).toContain('8.5 % MC')
    expect(sentences[3]).toContain('the shop is 5.1 points of % MC damper than Landing cupboard')
    expect(sentences[4]).toContain('no telling difference')
  })

  it('shows an old value as old', () => {
    const stale = room('Landing cupboard', 8.5, {
      air: { ...house.air, kind: 'stale', at: at('09:40') } as RuleRoom['air'],
    })
    expect(sentence({ rooms: [stale] })).toBe(
      'Nothing is logged out. No fresh reading anywhere: the last came from Landing cupboard at 09:40.',
    )
  })
})
