import { describe, expect, it } from 'vitest'
import type { PieceCheck } from '@/lib/carry/carry-check'
import { decideNotices } from './decide'
import type { NoticeCarry, NoticeInputs, NoticeState, VerdictHold } from './inputs'

const at = (text: string) => new Date(text).getTime()
const iso = (ms: number) => new Date(ms).toISOString()
const minute = 60_000

const site = { timeZone: 'Europe/London', quietFrom: '22:00', quietTo: '07:00', lockUpAt: '18:00' }
const people: NoticeInputs['people'] = [
  { userId: 'owner', role: 'owner', mailOn: true, onHouseList: false },
  { userId: 'maker', role: 'maker', mailOn: true, onHouseList: false },
  { userId: 'house', role: 'hand', mailOn: true, onHouseList: true },
  { userId: 'quiet', role: 'maker', mailOn: false, onHouseList: true },
  { userId: 'desk', role: 'onlooker', mailOn: true, onHouseList: true },
]

const verdict = (word: 'fine' | 'keep-short' | 'leave', earlyAt: number | null): PieceCheck => ({
  kind: 'verdict',
  verdict: word,
  words: '',
  reason: 'The shop is 5.1 points damper.',
  second: '',
  earlyAt: earlyAt === null ? null : iso(earlyAt),
  middleAt: earlyAt === null ? null : iso(earlyAt + 2 * 60 * minute),
  lateAt: null,
  ringMcPct: 8.5,
  lidMcPct: 9,
  mcDoubtPct: 0.5,
  cutMcPct: 8.5,
  thereEmcPct: 13.6,
  changePct: 1,
  allowedMcPct: 2,
  lossMm: 0.1,
  allowanceMm: 0.2,
  usedAtStart: 0,
  usedAtEnd: 0.5,
  curve: { at: [], usedEarly: [], used: [], usedLate: [] },
  assumed: [],
})
const unknown: PieceCheck = {
  kind: 'unknown',
  reason: 'no-reading',
  words: 'No reading since 09:40.',
  since: null,
}

const plannedAt = at('2026-03-05T14:00:00Z')
const plan = (check: PieceCheck, more: Partial<NoticeCarry> = {}): NoticeCarry => ({
  code: 'abc',
  state: 'planned',
  plannedAt,
  stayMinutes: 180,
  roomName: 'the shop',
  madeBy: 'maker',
  airAt: plannedAt - 61 * minute,
  pieces: [{ code: 'p219', number: '219', stage: 'box', outAt: null, check }],
  ...more,
})
const outAt = at('2026-03-05T11:58:00Z')
const earlyAt = at('2026-03-05T13:35:00Z')
const outing = (check: PieceCheck, stage: 'box' | 'roughed' = 'box'): NoticeCarry =>
  plan(check, { state: 'out', pieces: [{ code: 'p207', number: '207', stage, outAt, check }] })

const inputs = (more: Partial<NoticeInputs>): NoticeInputs => ({
  site,
  carries: [],
  sensors: [],
  people,
  ...more,
})
const fresh: NoticeState = { told: new Set(), holds: new Map() }

/** Lets decisions follow one another as the worker does, with what was told kept in between. */
function run(steps: { now: number; inputs: NoticeInputs }[]): string[][] {
  const told = new Set<string>()
  let holds = new Map<string, VerdictHold>()
  return steps.map((step) => {
    const decision = decideNotices(step.now, { told, holds }, step.inputs)
    holds = new Map(
      decision.episodes.flatMap(({ subject, key, hold }) =>
        hold ? [[`${subject} ${key}`, hold] as const] : [],
      ),
    )
    for (const notice of decision.notices) told.add(notice.key)
    return decision.notices.map((notice) => notice.rule)
  })
}

describe('a planned carry', () => {
  it('is told of at 19:00 the evening before and an hour before, each once', () => {
    const leave = inputs({ carries: [plan(verdict('leave', plannedAt + 20 * minute))] })
    const times = ['04T18:59', '04T19:00', '04T19:01', '05T12:59', '05T13:00', '05T13:01', '05T13:59']
    expect(run(times.map((time) => ({ now: at(`2026-03-${time}:00Z`), inputs: leave })))).toEqual([
      [],
      ['planned-carry'],
      [],
      [],
      ['planned-carry'],
      [],
      [],
    ])
  })

  it('is not told of once more when it is short, was told of in the evening and ends in time', () => {
    const times = ['04T19:00', '05T13:00', '05T13:01']
    const told = (stayMinutes: number) => {
      const short = plan(verdict('keep-short', plannedAt + 90 * minute), { stayMinutes })
      return run(
        times.map((time) => ({ now: at(`2026-03-${time}:00Z`), inputs: inputs({ carries: [short] }) })),
      )
    }
    expect(told(90)).toEqual([['planned-carry'], [], []])
    expect(told(91)).toEqual([['planned-carry'], ['planned-carry'], []])
  })

  it('takes 19:00 by the clocks of the site', () => {
    const summer = plan(verdict('leave', null), { plannedAt: at('2026-07-05T13:00:00Z') })
    const steps = ['04T17:59', '04T18:00'].map((time) => ({
      now: at(`2026-07-${time}:00Z`),
      inputs: inputs({ carries: [summer] }),
    }))
    expect(run(steps)).toEqual([[], ['planned-carry']])
  })

  it('is told of at once when it was planned inside the hour', () => {
    const soon = inputs({ carries: [plan(verdict('keep-short', plannedAt + 60 * minute))] })
    const { notices } = decideNotices(plannedAt - 10 * minute, fresh, soon)
    expect(notices.map(({ rule, title }) => [rule, title])).toEqual([
      ['planned-carry', '219 is down to go to the shop at 14:00: 219 must be back by 15:00.'],
    ])
  })

  it('is not told of while it looks fine', () => {
    const fine = inputs({ carries: [plan(verdict('fine', null))] })
    expect(decideNotices(plannedAt - 30 * minute, fresh, fine).notices).toEqual([])
  })

  it('is told of again when it worsens, and not for a single swing', () => {
    const short = (airAt: number) =>
      inputs({ carries: [plan(verdict('keep-short', plannedAt + 9e6), { airAt })] })
    const leave = (airAt: number) => inputs({ carries: [plan(verdict('leave', plannedAt + 6e5), { airAt })] })
    const from = plannedAt - 50 * minute
    const steps = [short, leave, short, leave, leave, leave].map((as, i) => ({
      now: from + i * 6 * minute,
      inputs: as(from + i * 6 * minute),
    }))
    expect(run(steps)).toEqual([['planned-carry'], [], [], [], ['verdict-worse'], []])
  })

  it('says that the humidity is not known when the sensor there is silent, never that it is fine', () => {
    const { notices } = decideNotices(plannedAt - 30 * minute, fresh, inputs({ carries: [plan(unknown)] }))
    expect(notices[0]?.title).toBe(
      '219 is down to go to the shop at 14:00, and its humidity is not known: no reading since 12:59.',
    )
    expect(notices[0]?.mark).toBe('unknown')
  })

  it('is forgotten an hour after its time', () => {
    const leave = inputs({ carries: [plan(verdict('leave', null))] })
    expect(decideNotices(plannedAt + 61 * minute, fresh, leave)).toEqual({ episodes: [], notices: [] })
  })

  it('goes to whoever planned it and to the house list, but to no onlooker and nobody who wants no mail', () => {
    const leave = (madeBy: string | null) => inputs({ carries: [plan(verdict('leave', null), { madeBy })] })
    const told = (madeBy: string | null) =>
      decideNotices(plannedAt - minute, fresh, leave(madeBy)).notices[0]?.deliveries.map(
        ({ userId }) => userId,
      )
    expect(told('maker')).toEqual(['maker', 'house'])
    expect(told(null)).toEqual(['owner', 'maker', 'house'])
  })
})

describe('a piece that is out', () => {
  const about = inputs({ carries: [outing(verdict('keep-short', earlyAt))] })

  it('is told of before its early edge by a quarter of its time out, and at the edge, each once', () => {
    // 97 min out: a quarter of it is 24 min.
    const times = ['13:10', '13:11', '13:12', '13:34', '13:35', '13:36']
    expect(run(times.map((time) => ({ now: at(`2026-03-05T${time}:00Z`), inputs: about })))).toEqual([
      [],
      ['time-nearly-out'],
      [],
      [],
      ['time-out'],
      [],
    ])
  })

  it('is told of once on return when the worker was down meanwhile, with the true beginning', () => {
    const late = decideNotices(at('2026-03-05T14:10:00Z'), fresh, about)
    expect(late.notices.map(({ rule }) => rule)).toEqual(['time-out'])
    expect(late.episodes.map(({ beganAt }) => iso(beganAt))).toEqual([iso(earlyAt)])
  })

  it('says nothing late about a piece that came back meanwhile', () => {
    expect(decideNotices(at('2026-03-05T14:10:00Z'), fresh, inputs({}))).toEqual({
      episodes: [],
      notices: [],
    })
  })

  it('tells the same however often and by whomever it is decided', () => {
    const once = decideNotices(earlyAt, fresh, about)
    expect(decideNotices(earlyAt, fresh, about)).toEqual(once)
    const told = new Set(once.notices.map(({ key }) => key))
    expect(decideNotices(earlyAt + 1, { ...fresh, told }, about).notices).toEqual([])
  })

  it('wakes only its maker in quiet hours, and only for a finished box', () => {
    const night = at('2026-03-05T23:00:00Z')
    const mail = (stage: 'box' | 'roughed') =>
      decideNotices(night, fresh, inputs({ carries: [outing(verdict('keep-short', earlyAt), stage)] }))
        .notices.find(({ rule }) => rule === 'time-out')
        ?.deliveries.map(({ userId, holdUntil }) => [userId, holdUntil === null ? 'now' : iso(holdUntil)])
    const morning = '2026-03-06T07:00:00.000Z'
    expect(mail('box')).toEqual([
      ['maker', 'now'],
      ['house', morning],
    ])
    expect(mail('roughed')).toEqual([
      ['maker', morning],
      ['house', morning],
    ])
  })
})

describe('the evening question', () => {
  const about = inputs({ carries: [outing(verdict('fine', at('2026-03-06T01:00:00Z')))] })
  const rules = (now: string, of: NoticeInputs = about) =>
    decideNotices(at(`2026-03-05T${now}:00Z`), fresh, of).notices.map(({ rule }) => rule)

  it('is asked at lock-up and again at last call', () => {
    expect([rules('17:59'), rules('18:00'), rules('21:29'), rules('21:30'), rules('22:00')]).toEqual([
      [],
      ['lock-up'],
      ['lock-up'],
      ['last-call'],
      [],
    ])
  })

  it('names every piece that is still out, and is not asked when none is', () => {
    const { notices } = decideNotices(at('2026-03-05T18:00:00Z'), fresh, about)
    expect(notices[0]?.title).toBe('Lock-up: still out: 207.')
    expect(rules('18:00', inputs({ carries: [plan(verdict('fine', null))] }))).toEqual([])
  })
})

describe('a silent sensor', () => {
  const lastHeardAt = at('2026-03-05T03:40:00Z')
  const sensor = {
    code: 's1',
    name: 'Timber store',
    roomName: 'the timber store',
    lastHeardAt,
    freshUntil: lastHeardAt + 30 * minute,
    silentFrom: lastHeardAt + 120 * minute,
    piecesOutThere: [] as string[],
  }

  it('is told of once for one silence, held by quiet hours', () => {
    const [first, ...rest] = decideNotices(
      lastHeardAt + 120 * minute,
      fresh,
      inputs({ sensors: [sensor] }),
    ).notices
    expect(rest).toEqual([])
    expect(first?.deliveries.map(({ holdUntil }) => holdUntil && iso(holdUntil))).toEqual([
      '2026-03-05T07:00:00.000Z',
      '2026-03-05T07:00:00.000Z',
    ])
    expect(first?.body).toContain('coin cells')
    expect(decideNotices(lastHeardAt + 119 * minute, fresh, inputs({ sensors: [sensor] })).notices).toEqual(
      [],
    )
  })

  it('is told of as soon as its reading is no longer fresh while a piece is out there', () => {
    const watched = inputs({ sensors: [{ ...sensor, piecesOutThere: ['207'] }] })
    expect(
      decideNotices(lastHeardAt + 30 * minute, fresh, watched).notices.map(({ urgency }) => urgency),
    ).toEqual(['now'])
  })
})
