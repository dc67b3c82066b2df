import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { PieceCheck } from '@/lib/carry/carry-check'
import type { NoticeAnswer, NoticeCarry, NoticeInputs } from './inputs'
import { at, daysBefore, Ledger, room, yard, yardSite } from '@/tests/support/notice-yard'

const minute = 60_000
const outAt = at('2026-03-05T11:58:00Z')
const earlyAt = at('2026-03-05T13:35:00Z')

const check = (early: number): PieceCheck => ({
  kind: 'verdict',
  verdict: 'keep-short',
  words: '',
  reason: '',
  second: '',
  earlyAt: new Date(early).toISOString(),
  middleAt: new Date(early + 120 * minute).toISOString(),
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
const outing = (early = earlyAt): NoticeCarry => ({
  code: 'abc',
  state: 'out',
  plannedAt: outAt,
  stayMinutes: 180,
  roomName: 'the shop',
  madeBy: 'maker',
  airAt: outAt,
  pieces: [{ code: 'p207', number: '207', stage: 'box', outAt, check: check(early) }],
})
const isOut = yard({}, { carries: [outing()] })

/** Who is told at a time of the day, "time-out: maker, house". */
function look(ledger: Ledger, clock: string, inputs: NoticeInputs = isOut): string[] {
  return ledger
    .look(at(`2026-03-05T${clock}:00Z`), inputs)
    .map(({ rule, to }) => `${rule}: ${to.map(({ userId }) => userId).join(', ')}`)
}

/** The same look again, which must tell nothing new. */
function twice(ledger: Ledger, clock: string, inputs: NoticeInputs = isOut): string[] {
  const told = look(ledger, clock, inputs)
  expect(look(ledger, clock, inputs)).toEqual([])
  return told
}

const answer = (
  ledger: Ledger,
  clock: string,
  given: Pick<NoticeAnswer, 'userId' | 'answer'> & Partial<NoticeAnswer>,
) =>
  ledger.answers.push({
    rule: 'time-out',
    subject: 'piece p207',
    episodeKey: new Date(outAt).toISOString(),
    at: at(`2026-03-05T${clock}:00Z`),
    until: null,
    ...given,
  })

describe('a piece that is out too long', () => {
  it('is told to whoever took it and the first of the house list, then to the rest when nobody answers', () => {
    const ledger = new Ledger()
    expect(twice(ledger, '13:12')).toEqual(['time-nearly-out: maker, house'])
    expect(twice(ledger, '13:35')).toEqual(['time-out: maker, house'])
    expect(twice(ledger, '13:54')).toEqual([])
    expect(twice(ledger, '13:55')).toEqual(['time-out: aunt, uncle'])
    expect(twice(ledger, '15:00')).toEqual([])
  })

  it('goes to the next of the house list at once when somebody can’t', () => {
    const ledger = new Ledger()
    look(ledger, '13:35')
    answer(ledger, '13:37', { userId: 'house', answer: 'cant' })
    expect(twice(ledger, '13:37')).toEqual(['time-out: aunt'])
    answer(ledger, '13:40', { userId: 'aunt', answer: 'cant' })
    expect(twice(ledger, '13:40')).toEqual(['time-out: uncle'])
    expect(twice(ledger, '14:30')).toEqual([])
  })

  it('is asked again a quarter of an hour after "going now", and nobody else is', () => {
    const ledger = new Ledger()
    look(ledger, '13:35')
    answer(ledger, '13:40', { userId: 'house', answer: 'going' })
    expect(twice(ledger, '13:54')).toEqual([])
    expect(twice(ledger, '13:55')).toEqual(['time-out: house'])
    expect(twice(ledger, '14:30')).toEqual([])
    answer(ledger, '14:30', { userId: 'house', answer: 'going' })
    expect(twice(ledger, '14:45')).toEqual(['time-out: house'])
  })

  it('is asked again at the hour that was named by "later"', () => {
    const ledger = new Ledger()
    look(ledger, '13:35')
    answer(ledger, '13:40', { userId: 'maker', answer: 'later', until: at('2026-03-05T14:40:00Z') })
    expect(twice(ledger, '14:39')).toEqual([])
    expect(twice(ledger, '14:40')).toEqual(['time-out: maker'])
  })

  it('is not spoken of any more once it is in', () => {
    const ledger = new Ledger()
    look(ledger, '13:35')
    answer(ledger, '13:40', { userId: 'house', answer: 'going' })
    expect(look(ledger, '13:56', yard({}))).toEqual([])
  })
})

describe('lock-up', () => {
  const still = yard({}, { carries: [outing(at('2026-03-06T02:00:00Z'))] })
  it('asks the makers and the first of the house list, then the rest; last call asks everybody', () => {
    const ledger = new Ledger()
    expect(twice(ledger, '18:00', still)).toEqual(['lock-up: maker, house'])
    expect(twice(ledger, '18:20', still)).toEqual(['lock-up: aunt, uncle'])
    expect(twice(ledger, '21:30', still)).toEqual(['last-call: maker, house, aunt, uncle'])
    expect(twice(ledger, '22:00', still)).toEqual([])
  })

  const used = yard({ evening: { shopUse: 'warmed', isAnswered: false } })
  it('asks whether anything is still out when the shop was used and nothing is logged, until somebody says nothing', () => {
    expect(look(new Ledger(), '18:00', yard({}))).toEqual([])
    const ledger = new Ledger()
    expect(ledger.look(at('2026-03-05T18:00:00Z'), used)[0]?.title).toContain('anything still out?')
    answer(ledger, '18:05', {
      userId: 'house',
      answer: 'nothing',
      subject: 'site',
      episodeKey: '2026-03-05/anything',
    })
    expect(twice(ledger, '18:30', used)).toEqual([])
  })

  it('does not ask so when the page has the answer already, or nobody wants to be asked', () => {
    expect(look(new Ledger(), '18:00', yard({ evening: { shopUse: 'warmed', isAnswered: true } }))).toEqual(
      [],
    )
    const never = new Map([['lock-up', { isOn: true, settings: { whenNothing: 'never' } }]])
    expect(look(new Ledger(), '18:00', { ...used, rules: never })).toEqual([])
    const daily = new Map([['lock-up', { isOn: true, settings: { whenNothing: 'daily' } }]])
    expect(look(new Ledger(), '18:00', { ...yard({}), rules: daily })).toEqual(['lock-up: maker, house'])
  })

  it('leaves it at that where carries were logged today and all of them are back', () => {
    const logged = yard({ evening: { shopUse: 'carried', isAnswered: false } })
    expect(look(new Ledger(), '18:00', logged)).toEqual([])
    const daily = new Map([['lock-up', { isOn: true, settings: { whenNothing: 'daily' } }]])
    expect(look(new Ledger(), '18:00', { ...logged, rules: daily })).toEqual(['lock-up: maker, house'])
  })

  it('asks again in the morning whoever said so, if it is still out', () => {
    const ledger = new Ledger()
    look(ledger, '18:00', still)
    answer(ledger, '18:05', {
      userId: 'house',
      answer: 'later',
      until: at('2026-03-06T07:00:00Z'),
      subject: 'site',
      episodeKey: '2026-03-05',
    })
    const morning = ledger.look(at('2026-03-06T07:00:00Z'), still).filter(({ rule }) => rule === 'lock-up')
    expect(morning.map(({ title }) => title)).toEqual(['Still out: 207.'])
  })

  it.each([
    // The clocks of London go forward on 29 March and back on 25 October.
    ['Europe/London', '2026-03-29', '17:00'],
    ['Europe/London', '2026-10-25', '18:00'],
    // Lord Howe: UTC+10:30 from 5 April on, UTC+11 before.
    ['Australia/Lord_Howe', '2026-04-04', '07:00'],
    ['Australia/Lord_Howe', '2026-04-05', '07:30'],
  ])('is at 18:00 by the clocks of %s on %s', (timeZone, day, utc) => {
    const inputs = { ...still, site: { ...yardSite, timeZone } }
    const moment = at(`${day}T${utc}:00Z`)
    const asked = (now: number) =>
      new Ledger().look(now, inputs).filter(({ rule }) => rule === 'lock-up').length
    expect([asked(moment - 1000), asked(moment)]).toEqual([0, 1])
  })
})

describe('rules that are switched off', () => {
  const off = (...rules: string[]) => new Map(rules.map((rule) => [rule, { isOn: false, settings: {} }]))
  it('tell nothing, while the others go on', () => {
    const ledger = new Ledger()
    const inputs = { ...isOut, rules: off('time-nearly-out') }
    expect(look(ledger, '13:12', inputs)).toEqual([])
    expect(look(ledger, '13:35', inputs)).toEqual(['time-out: maker, house'])
  })
  it('wake nobody at night where that was chosen', () => {
    const night = at('2026-03-05T23:00:00Z')
    const wakes = (settings: Record<string, string>) =>
      new Ledger()
        .look(night, { ...isOut, rules: new Map([['time-out', { isOn: true, settings }]]) })
        .flatMap(({ to }) => to.map((one) => one.wakes))
    expect(wakes({})).toEqual([true, false])
    expect(wakes({ wakes: 'nobody' })).toEqual([false, false])
  })
})

describe('whatever happens', () => {
  const humidities = fc.array(fc.integer({ min: 25, max: 90 }), { minLength: 8, maxLength: 24 })
  it('no notice is told twice, none of one episode but its follow-ups, and a second look adds nothing', () => {
    fc.assert(
      fc.property(humidities, fc.array(fc.nat(9), { maxLength: 12 }), (course, skipped) => {
        const ledger = new Ledger()
        const keys: string[] = []
        course.forEach((_, n) => {
          // The worker is down on some days.
          if (skipped.includes(n)) return
          const now = at('2026-03-05T09:00:00Z') + n * 86_400_000
          const airs = course.slice(0, n + 1).map((humidityPct) => ({ temperatureC: 20, humidityPct }))
          const days = daysBefore(now, airs)
          const rooms = [room({ isKeepRoom: true, keepsDryWork: true, hasRestingWood: true, days })]
          const inputs = yard({ rooms })
          const told = ledger.look(now, inputs)
          keys.push(...told.map(({ key }) => key))
          expect(ledger.look(now + 30_000, inputs)).toEqual([])
        })
        expect(new Set(keys).size).toBe(keys.length)
        // A recovery is only ever told of what was told.
        for (const key of keys.filter((one) => one.endsWith('/over')))
          expect(keys).toContain(key.replace(/\/over$/, ''))
      }),
      { numRuns: 40, endOnFailure: true },
    )
  })
})
