import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { NewNotice, NoticeInputs, NoticePerson, PersonWishes } from './inputs'
import { clockOf, deliveriesOf, nextDigest, usualWishes } from './routing'
import { quietUntil } from '@/lib/sites/local-time'

const at = (text: string) => new Date(text).getTime()
const iso = (ms: number | null) => (ms === null ? null : new Date(ms).toISOString())
const site = { timeZone: 'Europe/London', quietFrom: '22:00', quietTo: '07:00', lockUpAt: '18:00' }

const person = (userId: string, wishes: Partial<PersonWishes> = {}, more: Partial<NoticePerson> = {}) =>
  ({
    userId,
    role: 'maker',
    mailOn: true,
    onHouseList: false,
    wishes: { ...usualWishes, ...wishes },
    ...more,
  }) satisfies NoticePerson

const inputsOf = (people: NoticePerson[]): NoticeInputs => ({ site, carries: [], sensors: [], people })
const noticeTo = (to: string[], more: Partial<NewNotice> & { wakes?: boolean } = {}): NewNotice => ({
  key: 'k',
  rule: 'time-out',
  urgency: 'now',
  mark: 'leave',
  title: 'Bring 207 in now.',
  body: '',
  link: '/carry',
  episode: { rule: 'time-out', subject: 's', key: 'k' },
  ...more,
  to: to.map((userId) => ({ userId, wakes: more.wakes === true })),
})

/** "ada mail 2026-…", "ben push at once". */
const told = (now: string, notice: NewNotice, people: NoticePerson[]): string[] =>
  deliveriesOf(at(now), notice, inputsOf(people)).map(
    ({ userId, channel, holdUntil }) => `${userId} ${channel} ${iso(holdUntil) ?? 'at once'}`,
  )

const noon = '2026-03-05T12:00:00Z'
const night = '2026-03-05T23:00:00Z'

describe('quiet hours', () => {
  it.each([
    ['the site’s', {}, night, '2026-03-06T07:00:00.000Z'],
    ['none at noon', {}, noon, null],
    ['a person’s own', { quiet: { from: '11:00', to: '13:30' } }, noon, '2026-03-05T13:30:00.000Z'],
    // Noon in London is one in the morning of the next day in Auckland (UTC+13 in March).
    [
      'the site’s hours by the person’s clock',
      { timeZone: 'Pacific/Auckland' },
      noon,
      '2026-03-05T18:00:00.000Z',
    ],
    ['not the site’s night', { timeZone: 'Pacific/Auckland' }, night, null],
    // The clocks of London go forward in the night to 29 March: 07:00 is an hour sooner than after other nights.
    ['over the change of the clocks', {}, '2026-03-28T23:00:00Z', '2026-03-29T06:00:00.000Z'],
    // New York's go back in the night to 1 November.
    [
      'over the change in a zone of one’s own',
      { timeZone: 'America/New_York' },
      '2026-11-01T03:00:00Z',
      '2026-11-01T12:00:00.000Z',
    ],
  ] as const)('%s', (_, wishes, now, until) => {
    expect(told(now, noticeTo(['ada']), [person('ada', wishes)])).toEqual([`ada mail ${until ?? 'at once'}`])
  })

  it('hold nothing that wakes', () => {
    const people = [person('ada', { pushOn: true, digest: 'weekly' })]
    expect(told(night, noticeTo(['ada'], { wakes: true }), people)).toEqual([
      'ada mail at once',
      'ada push at once',
    ])
  })
})

describe('a digest', () => {
  const whenever = noticeTo(['ada'], { rule: 'weighing-due', urgency: 'whenever' })
  it('holds what can wait for the next one by the person’s clock', () => {
    expect(told(noon, whenever, [person('ada', { digest: 'daily' })])).toEqual([
      'ada mail 2026-03-06T07:30:00.000Z',
    ])
    // 5 March 2026 is a Thursday.
    expect(told(noon, whenever, [person('ada', { digest: 'weekly', digestWeekday: 1 })])).toEqual([
      'ada mail 2026-03-09T07:30:00.000Z',
    ])
    const far = { digest: 'daily', timeZone: 'Pacific/Auckland' } as const
    expect(told(noon, whenever, [person('ada', far)])).toEqual(['ada mail 2026-03-05T18:30:00.000Z'])
  })
  it('holds nothing that presses', () => {
    const people = [person('ada', { digest: 'weekly' })]
    expect(told(noon, noticeTo(['ada'], { urgency: 'soon' }), people)).toEqual(['ada mail at once'])
  })
  it('waits for the end of quiet hours when its hour lies in them', () => {
    const people = [person('ada', { digest: 'daily', digestAt: '05:00' })]
    expect(told(noon, whenever, people)).toEqual(['ada mail 2026-03-06T07:00:00.000Z'])
  })
  it('is a week away on its own day once its hour has passed', () => {
    const thursday = { digest: 'weekly', digestAt: '07:30', digestWeekday: 4 } as const
    expect(iso(nextDigest(at(noon), thursday, 'Europe/London'))).toBe('2026-03-12T07:30:00.000Z')
    expect(iso(nextDigest(at('2026-03-26T12:00:00Z'), thursday, 'Europe/London'))).toBe(
      '2026-04-02T06:30:00.000Z',
    )
  })
})

describe('channels', () => {
  it('follow the person, and for one rule what they chose of it', () => {
    const rules = { 'time-out': { mailOn: false, pushOn: true } }
    expect(told(noon, noticeTo(['ada']), [person('ada', { pushOn: true, rules })])).toEqual([
      'ada push at once',
    ])
    const other = noticeTo(['ada'], { rule: 'lock-up' })
    expect(told(noon, other, [person('ada', { pushOn: true, rules })])).toEqual([
      'ada mail at once',
      'ada push at once',
    ])
    const only = { 'time-out': { mailOn: true, pushOn: false } }
    expect(told(noon, noticeTo(['ada']), [person('ada', { rules: only }, { mailOn: false })])).toEqual([
      'ada mail at once',
    ])
  })
})

describe('somebody who is away', () => {
  const away = (coveredBy: string | null) => ({
    away: { from: at('2026-03-01T00:00:00Z'), until: at('2026-03-08T00:00:00Z'), coveredBy },
  })
  it('is stood in for by one person, told once', () => {
    const people = [person('ada', away('ben')), person('ben')]
    expect(told(noon, noticeTo(['ada', 'ben']), people)).toEqual(['ben mail at once'])
  })
  it('is stood in for by the makers when nobody covers, or who does has left', () => {
    const people = [person('ada', away(null)), person('ben'), person('kit', {}, { role: 'hand' })]
    expect(told(noon, noticeTo(['ada']), people)).toEqual(['ben mail at once'])
    expect(told(noon, noticeTo(['ada']), [person('ada', away('gone')), person('ben')])).toEqual([
      'ben mail at once',
    ])
  })
  it('is told all the same when everybody is away', () => {
    const people = [person('ada', away('ben')), person('ben', away('ada'))]
    expect(told(noon, noticeTo(['ada']), people)).toEqual(['ada mail at once'])
  })
  it('hears again once back', () => {
    const people = [person('ada', away('ben')), person('ben')]
    expect(told('2026-03-08T12:00:00Z', noticeTo(['ada']), people)).toEqual(['ada mail at once'])
  })
})

describe('somebody at work', () => {
  const session = { sessionUntil: at('2026-03-05T17:00:00Z'), pushOn: true }
  const house = person('kit', {}, { role: 'hand', onHouseList: true })
  it('gets mail when the session ends, sees it on the phone at once, and the house list hears in their stead', () => {
    expect(told(noon, noticeTo(['ada']), [person('ada', session), house])).toEqual([
      'ada mail 2026-03-05T17:00:00.000Z',
      'ada push at once',
      'kit mail at once',
    ])
  })
  it('is not stood in for in what can wait', () => {
    const whenever = noticeTo(['ada'], { urgency: 'whenever' })
    expect(told(noon, whenever, [person('ada', session), house])).toEqual([
      'ada mail 2026-03-05T17:00:00.000Z',
      'ada push at once',
    ])
  })
})

const zones = [
  'Europe/London',
  'Pacific/Auckland',
  'America/New_York',
  'Australia/Lord_Howe',
  'Asia/Kathmandu',
]
const clockTime = fc
  .record({ hour: fc.integer({ min: 0, max: 23 }), minute: fc.integer({ min: 0, max: 59 }) })
  .map(({ hour, minute }) => `${String(hour).padStart(2, '0')}:${String(minute).padStart(2, '0')}`)
const moment = fc.integer({ min: at('2026-01-01T00:00:00Z'), max: at('2027-01-01T00:00:00Z') })
const ids = ['a', 'b', 'c', 'd']
const anyPerson = (now: number, userId: string): fc.Arbitrary<NoticePerson> =>
  fc.record({
    userId: fc.constant(userId),
    role: fc.constantFrom('owner' as const, 'maker' as const, 'hand' as const),
    mailOn: fc.boolean(),
    onHouseList: fc.boolean(),
    wishes: fc.record({
      pushOn: fc.boolean(),
      rules: fc.constant({}),
      quiet: fc.option(fc.record({ from: clockTime, to: clockTime })),
      timeZone: fc.option(fc.constantFrom(...zones)),
      digest: fc.constantFrom('none' as const, 'daily' as const, 'weekly' as const),
      digestAt: clockTime,
      digestWeekday: fc.integer({ min: 1, max: 7 }),
      away: fc.option(
        fc.record({
          from: fc.constant(now - 1),
          until: fc.constant(now + 1),
          coveredBy: fc.option(fc.constantFrom(...ids)),
        }),
      ),
      sessionUntil: fc.option(fc.constant(now + 3_600_000)),
    }),
  })
const scene = moment.chain((now) =>
  fc.record({
    now: fc.constant(now),
    people: fc.tuple(...ids.map((id) => anyPerson(now, id))),
    urgency: fc.constantFrom('now' as const, 'soon' as const, 'whenever' as const),
    wakes: fc.boolean(),
    to: fc.subarray(ids, { minLength: 1 }),
  }),
)

describe('whatever people choose', () => {
  it('nobody with a channel is lost, nothing is held without an end, and nothing that wakes is held but by work', () => {
    fc.assert(
      fc.property(scene, ({ now, people, urgency, wakes, to }) => {
        const notice = noticeTo(to, { urgency, wakes })
        const deliveries = deliveriesOf(now, notice, inputsOf(people))
        const names = deliveries.map(({ userId, channel }) => `${userId} ${channel}`)
        expect(new Set(names).size).toBe(names.length)
        for (const { holdUntil } of deliveries)
          if (holdUntil !== null) {
            expect(holdUntil).toBeGreaterThan(now)
            expect(holdUntil).toBeLessThanOrEqual(now + 10 * 86_400_000)
          }
        for (const one of people.filter(({ userId }) => to.includes(userId))) {
          if (one.wishes?.away) continue
          const own = deliveries.filter(({ userId }) => userId === one.userId)
          expect(own.map(({ channel }) => channel)).toEqual([
            ...(one.mailOn ? ['mail'] : []),
            ...(one.wishes?.pushOn === true ? ['push'] : []),
          ])
          if (wakes)
            for (const { channel, holdUntil } of own)
              expect(holdUntil).toBe(channel === 'mail' ? (one.wishes?.sessionUntil ?? null) : null)
        }
      }),
      { numRuns: 300, endOnFailure: true },
    )
  })

  it('nothing that does not wake arrives in anybody’s quiet hours', () => {
    fc.assert(
      fc.property(scene, ({ now, people, urgency, to }) => {
        for (const one of deliveriesOf(now, noticeTo(to, { urgency }), inputsOf(people))) {
          const wishes = people.find(({ userId }) => userId === one.userId)?.wishes ?? usualWishes
          expect(quietUntil(one.holdUntil ?? now, clockOf(wishes, site))).toBeNull()
        }
      }),
      { numRuns: 200, endOnFailure: true },
    )
  })
})
