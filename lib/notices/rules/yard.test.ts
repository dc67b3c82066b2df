import { describe, expect, it } from 'vitest'
import type { NoticeSensor } from '../inputs'
import type { NoticeBlank, NoticeStrip, NoticeTub, RestingBox, StripKind } from '../surroundings'
import { at, Ledger, rulesOf, yard } from '@/tests/support/notice-yard'

const hourMs = 3_600_000
const dayMs = 24 * hourMs
const start = at('2026-03-05T09:00:00Z')

describe('boxes that lose their fit where they stand', () => {
  const box = (number: string, used: number): RestingBox => ({
    code: `p${number}`,
    number,
    roomCode: 'study',
    roomName: 'Study',
    used,
  })
  const look = (ledger: Ledger, day: number, ...boxes: RestingBox[]) =>
    ledger
      .look(start + day * dayMs, yard({ boxes }))
      .map(({ title }) => title.replace(/ (is|are) losing.*/, ''))

  it('are told together, once each, and weekly at most', () => {
    const ledger = new Ledger()
    expect(look(ledger, 0, box('207', 0.79), box('219', 0.5))).toEqual([])
    expect(look(ledger, 1, box('207', 0.82), box('219', 0.81))).toEqual(['207 and 219'])
    expect(look(ledger, 2, box('207', 0.9), box('219', 0.85), box('221', 0.9))).toEqual([])
    expect(look(ledger, 7.9, box('207', 0.9), box('221', 0.9), box('226', 0.95))).toEqual([])
    expect(look(ledger, 8, box('207', 0.9), box('221', 0.9), box('226', 0.95))).toEqual(['221 and 226'])
    expect(look(ledger, 30, box('207', 1.2), box('221', 0.9), box('226', 0.95))).toEqual([])
  })

  it('are not told anew for going to and fro at the limit', () => {
    const ledger = new Ledger()
    expect(look(ledger, 0, box('207', 0.81))).toEqual(['207'])
    expect(look(ledger, 10, box('207', 0.75))).toEqual([])
    expect(look(ledger, 20, box('207', 0.82))).toEqual([])
    expect(look(ledger, 30, box('207', 0.6))).toEqual([])
    expect(look(ledger, 40, box('207', 0.82))).toEqual(['207'])
  })
})

describe('blanks', () => {
  const blank = (number: string, more: Partial<NoticeBlank> = {}): NoticeBlank => ({
    code: `b${number}`,
    number,
    roomCode: 'study',
    seriesKey: 's1',
    isReady: false,
    isByWeightAlone: false,
    weighingDueAt: start + 60 * dayMs,
    ...more,
  })
  const look = (ledger: Ledger, day: number, ...blanks: NoticeBlank[]) =>
    ledger.look(start + day * dayMs, yard({ blanks })).map(({ title }) => title)

  it('that are ready are told once for a series, even when they waver', () => {
    const ledger = new Ledger()
    expect(look(ledger, 0, blank('88', { isReady: true }), blank('91', { isReady: true }))).toEqual([
      'Blanks 88 and 91 are ready to finish.',
    ])
    expect(look(ledger, 1, blank('88'), blank('91', { isReady: true }))).toEqual([])
    expect(look(ledger, 2, blank('88', { isReady: true }))).toEqual([])
    expect(look(ledger, 200, blank('88', { isReady: true, seriesKey: 's2' }))).toEqual([
      'Blank 88 is ready to finish.',
    ])
  })

  it('that are due to be weighed are told together, weekly at most, and not once they are ready', () => {
    const due = (day: number) => ({ weighingDueAt: start + day * dayMs })
    const ledger = new Ledger()
    expect(look(ledger, 0, blank('88', due(0)), blank('91', due(3)))).toEqual(['88 is due to be weighed.'])
    expect(look(ledger, 4, blank('88', due(0)), blank('91', due(3)))).toEqual([])
    expect(look(ledger, 7, blank('88', due(0)), blank('91', due(3)))).toEqual(['91 is due to be weighed.'])
    expect(look(new Ledger(), 0, blank('88', { ...due(0), isReady: true }))).toEqual([
      'Blank 88 is ready to finish.',
    ])
  })
})

describe('sensors', () => {
  const sensor = (batteryPct: number | null): NoticeSensor => ({
    code: 's1',
    name: 'Shelf',
    roomName: 'Study',
    lastHeardAt: start,
    freshUntil: start + 9 * dayMs,
    silentFrom: start + 9 * dayMs,
    piecesOutThere: [],
    batteryPct,
  })
  it('with a battery that is nearly empty are told once, and anew after it was changed', () => {
    const ledger = new Ledger()
    const charges = [null, 16, 15, 14, 18, 15, 20, 15, 90, 14]
    expect(
      charges.map(
        (pct, n) => rulesOf(ledger.look(start + n * hourMs, yard({}, { sensors: [sensor(pct)] }))).length,
      ),
    ).toEqual([0, 0, 1, 0, 0, 0, 0, 0, 0, 1])
  })
  it('carry the caution about coin cells', () => {
    const [notice] = new Ledger().look(start, yard({}, { sensors: [sensor(5)] }))
    expect(notice?.body).toContain('coin cells')
  })

  const refused = (today: number, lastHour: number, isOldNews = false) => [
    { sensorCode: 's1', sensorName: 'Shelf', today, lastHour, isOldNews },
  ]
  const tell = (ledger: Ledger, hours: number, ...counts: Parameters<typeof refused>) =>
    rulesOf(ledger.look(start + hours * hourMs, yard({ refused: refused(...counts) })))
  it('whose messages can not be used are told once a day; of one that does so daily, when they are many', () => {
    const ledger = new Ledger()
    expect(tell(ledger, 0, 1, 1)).toEqual(['refused-messages'])
    expect(tell(ledger, 1, 40, 39)).toEqual([])
    expect(tell(ledger, 24, 2, 2, true)).toEqual([])
    expect(tell(ledger, 25, 14, 10, true)).toEqual(['refused-messages'])
    expect(tell(ledger, 48, 1, 1)).toEqual(['refused-messages'])
  })
})

describe('a tub that turns cold', () => {
  const tub = (now: number, temperatures: number[], more: Partial<NoticeTub> = {}): NoticeTub => ({
    roomCode: 'tub',
    roomName: 'the lidded tub',
    readings: temperatures.map((temperatureC, n) => ({
      at: now - (temperatures.length - 1 - n) * 10 * 60_000,
      temperatureC,
    })),
    shopC: 6,
    houseC: 20,
    usualC: 19,
    isLoggedOut: false,
    ...more,
  })
  const look = (ledger: Ledger, minutes: number, temperatures: number[], more: Partial<NoticeTub> = {}) => {
    const now = start + minutes * 60_000
    return rulesOf(ledger.look(now, yard({ tubs: [tub(now, temperatures, more)] })))
  }

  it('is asked after once, until it is warm again', () => {
    const ledger = new Ledger()
    expect(look(ledger, 0, [19, 19, 18.5])).toEqual([])
    expect(look(ledger, 20, [19, 17, 14.5])).toEqual(['tub-out'])
    expect(look(ledger, 30, [17, 14.5, 11])).toEqual([])
    expect(look(ledger, 200, [8, 8, 8])).toEqual([])
    expect(look(ledger, 400, [18, 18, 18.5])).toEqual([])
    expect(look(ledger, 900, [19, 15, 14])).toEqual(['tub-out'])
  })
  it('is asked after when it fell slowly, once it is nearer to the shop than to the house', () => {
    expect(look(new Ledger(), 0, [12.6, 12.4, 12.3])).toEqual(['tub-out'])
    expect(look(new Ledger(), 0, [14, 13.9, 13.8])).toEqual([])
  })
  it('is left alone when a carry in a tub is out, when it lives in the shop, and in a mild season', () => {
    expect(look(new Ledger(), 0, [19, 10], { isLoggedOut: true })).toEqual([])
    expect(look(new Ledger(), 0, [7, 7], { usualC: 7 })).toEqual([])
    expect(look(new Ledger(), 0, [18, 17.5], { shopC: 17, houseC: 20 })).toEqual([])
  })
  it('is left alone with no reading', () => {
    expect(look(new Ledger(), 0, [])).toEqual([])
  })
})

describe('the coming hours of a shop', () => {
  const strip = (from: number, kind: (hour: number) => StripKind): NoticeStrip => ({
    roomCode: 'shop',
    roomName: 'the shop',
    cells: Array.from({ length: 48 }, (_, n) => {
      const cellAt = from + n * hourMs
      return { at: cellAt, kind: kind(new Date(cellAt).getUTCHours()) }
    }),
  })
  const on = new Map([
    ['shop-unfit', { isOn: true, settings: {} }],
    ['good-hours', { isOn: true, settings: {} }],
  ])
  const look = (ledger: Ledger, text: string, kind: (hour: number) => StripKind, rules = on) =>
    rulesOf(
      ledger.look(
        at(text),
        yard({ strips: [strip(at(text.replace(/:\d\d:00Z/, ':00:00Z')), kind)] }, { rules }),
      ),
    )
  const unfit = (): StripKind => 'unfit'
  const midday = (hour: number): StripKind => (hour >= 11 && hour < 15 ? 'fit' : 'unfit')

  it('that are all unfit are told on the first evening of a spell', () => {
    const ledger = new Ledger()
    expect(look(ledger, '2026-03-05T18:44:00Z', unfit)).toEqual([])
    expect(look(ledger, '2026-03-05T18:45:00Z', unfit)).toEqual(['shop-unfit'])
    expect(look(ledger, '2026-03-06T08:00:00Z', midday)).toEqual(['good-hours'])
    expect(look(ledger, '2026-03-06T18:50:00Z', unfit)).toEqual([])
    expect(look(ledger, '2026-03-07T18:50:00Z', midday)).toEqual([])
    expect(look(ledger, '2026-03-08T18:50:00Z', unfit)).toEqual(['shop-unfit'])
  })
  it('that are good are told in the morning of each day that has enough of them', () => {
    const ledger = new Ledger()
    expect(look(ledger, '2026-03-05T07:29:00Z', midday)).toEqual([])
    expect(look(ledger, '2026-03-05T07:30:00Z', midday)).toEqual(['good-hours'])
    expect(look(ledger, '2026-03-05T08:30:00Z', midday)).toEqual([])
    expect(look(ledger, '2026-03-06T07:31:00Z', (hour) => (hour === 12 ? 'fit' : 'tolerable'))).toEqual([])
  })
  it('are told only to those who asked: both come switched off', () => {
    expect(look(new Ledger(), '2026-03-05T18:45:00Z', unfit, new Map())).toEqual([])
    expect(look(new Ledger(), '2026-03-05T07:30:00Z', midday, new Map())).toEqual([])
  })
})
