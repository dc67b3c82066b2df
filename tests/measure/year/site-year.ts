import { woodOfPiece } from '@/lib/carry/joint-defaults'
import type { CarryMaterial, PieceMaterial } from '@/lib/carry/material'
import { dayOfInstant, daysAfter } from '@/lib/climate/days'
import { UNLEARNED_PACE } from '@/lib/follow/learned-pace'
import { airsOf, followOn } from '@/lib/follow/record'
import type { RoutedNotice } from '@/lib/notices/inputs'
import { instantOfLocalTime } from '@/lib/sites/local-time'
import { type Chance, chanceOf } from './chance'
import {
  heedAdvice,
  heedCall,
  heedPage,
  ownReturnAt,
  takenBoxes,
  wishedCarries,
  type YearCarry,
} from './maker'
import { roomRecord, type RoomRecord } from './record'
import { newScore, type YearScore } from './score'
import { READING_GAP_MS, yearSensor, type YearSensor } from './sensors'
import { retrued, type ShelfBox, shelfBox } from './shelf'
import { checkOf, type HangingSensor, siteNotices, YEAR_SITE } from './site-notices'
import { type ShopForecasts, shopForecasts } from './shop-forecast'
import { scoreCheck, scoreForgotten, scorePlan } from './judge-carry'
import { advance, lostMm, OUT_STEP_MS, type TrueSite } from './truth-box'
import { truthAir } from './truth-air'
import { trueEmcPct } from './truth-emc'

const MINUTE_MS = 60_000
const HOUR_MS = 60 * MINUTE_MS
const DAY_MS = 24 * HOUR_MS
const TICK_MS = 5 * MINUTE_MS
/** Of record before anything is carried, so that rooms have a middle and forecasts something to go by. */
const LEAD_DAYS = 30
const BOXES = 24
const START_ON = '2026-01-05'

export const ROOMS = { cupboard: 1, shop: 2, outdoor: 3 } as const

export interface SiteYear {
  readonly site: TrueSite
  readonly rooms: Readonly<Record<keyof typeof ROOMS, { record: RoomRecord; sensor: YearSensor }>>
  readonly forecasts: ShopForecasts
  readonly shelf: ShelfBox[]
  carries: YearCarry[]
  readonly score: YearScore
}

/** One simulated year of one site, told and judged. The same seed gives the same year. */
export function siteYear(seed: number, days = 365): YearScore {
  const beginMs = instantOfLocalTime(START_ON, '00:00', YEAR_SITE.timeZone)
  const fromMs = beginMs - LEAD_DAYS * DAY_MS
  const untilMs = beginMs + days * DAY_MS
  const air = truthAir(seed, fromMs, untilMs + 31 * DAY_MS)
  const site: TrueSite = { air, bend: chanceOf(seed, 'bend').between(-0.06, 0.06) }
  const room = (name: keyof typeof ROOMS, kind: 'cupboard' | 'shop' | 'outdoor') => ({
    record: roomRecord(kind),
    sensor: yearSensor(seed, name, air, fromMs),
  })
  const rooms = {
    cupboard: room('cupboard', 'cupboard'),
    shop: room('shop', 'shop'),
    outdoor: room('outdoor', 'outdoor'),
  }
  const score = newScore()
  score.weeks = days / 7
  const forecasts = shopForecasts(rooms, YEAR_SITE.timeZone, score)
  const year: SiteYear = { site, rooms, forecasts, shelf: [], carries: [], score }
  const chance = chanceOf(seed, 'shelf')
  const people = chanceOf(seed, 'people')
  const notices = siteNotices(ROOMS.shop)
  let number = 100
  const nextBox = (id: number, atMs: number): ShelfBox => {
    number += 1
    return shelfBox(chance, id, {
      number: String(number),
      atMs,
      truePct: trueMonthPct(site, atMs),
      toldPct: year.rooms.cupboard.record.meanPct(30) ?? 9,
      cupboardId: ROOMS.cupboard,
    })
  }
  for (let now = fromMs; now < untilMs; now += TICK_MS) {
    if (now % READING_GAP_MS === 0) takeReadings(year, now)
    if (now < beginMs) continue
    if (now === beginMs) for (let id = 1; id <= BOXES; id += 1) year.shelf.push(nextBox(id, now))
    if (now % HOUR_MS === 0) {
      followShelf(year, now)
      year.forecasts.hour(now, air.isWarmed)
    }
    if ((now - beginMs) % DAY_MS === 12 * HOUR_MS) {
      makePlans(year, people, now)
      year.shelf.forEach((box, n) => {
        if (box.isTaken) return
        if (now >= box.leavesAt) year.shelf[n] = nextBox(box.id, now)
        else tryLid(year, people, box, now)
      })
    }
    lookAtPlans(year, people, now)
    goAndReturn(year, people, now)
    if (isTimeToDecide(year, now))
      for (const notice of notices.decide(now, materialOf(year, now), year.carries, sensorsOf(year)))
        hear(year, people, notice, now, notices.earlyAt)
  }
  return year.score
}

/** What wood that rested in the cupboard has come to in truth, % MC: the mean of thirty days. */
function trueMonthPct({ air, bend }: TrueSite, atMs: number): number {
  const samples = Array.from({ length: 240 }, (_, n) => {
    const { temperatureC, humidityPct } = air.at('cupboard', atMs - n * 3 * HOUR_MS)
    return trueEmcPct(temperatureC, humidityPct, bend)
  })
  return samples.reduce((sum, value) => sum + value, 0) / samples.length
}

function takeReadings({ rooms }: SiteYear, now: number): void {
  for (const { record, sensor } of Object.values(rooms)) {
    const reading = sensor.read(now)
    if (reading !== undefined) record.take(now, reading)
  }
}

function followShelf(year: SiteYear, now: number): void {
  const material = materialOf(year, now)
  for (const box of year.shelf) {
    const { filter } = woodOfPiece(box.facts)
    const airs = airsOf(box.stays, (id) => material.rooms.get(id), box.followed.atMs, now)
    const out = box.stays.at(-1)
    box.followed = followOn(filter, box.followed, {
      airs,
      untilMs: now,
      outAtMs: out?.roomId === ROOMS.shop ? out.fromAt.getTime() : null,
      diffusionFactor: UNLEARNED_PACE.factor,
    })
  }
}

export function materialOf({ shelf, rooms, forecasts }: SiteYear, now: number): CarryMaterial {
  const at = new Date(now)
  return {
    now: at,
    pieces: new Map(
      shelf.map((box): [number, PieceMaterial] => [
        box.id,
        {
          code: box.code,
          facts: box.facts,
          stays: box.stays,
          followed: box.followed,
          keepRoomId: ROOMS.cupboard,
          isKeepRoomAssumed: false,
          cut: box.cut,
          pace: UNLEARNED_PACE,
        },
      ]),
    ),
    rooms: new Map([
      [ROOMS.cupboard, rooms.cupboard.record.material(at)],
      [ROOMS.shop, { ...rooms.shop.record.material(at), forecast: forecasts.newest(now) }],
    ]),
  }
}

function sensorsOf({ rooms }: SiteYear): HangingSensor[] {
  const hung = { roomName: 'Cupboard', isKeepingRoom: true, isCarriedTo: false }
  return [
    { ...hung, code: 'cupboard', last: rooms.cupboard.record.last() },
    {
      code: 'shop',
      roomName: 'Shop',
      isKeepingRoom: false,
      isCarriedTo: true,
      last: rooms.shop.record.last(),
    },
  ]
}

/** Plans of the next working day. */
function makePlans(year: SiteYear, people: Chance, now: number): void {
  const day = daysAfter(dayOfInstant(new Date(now), YEAR_SITE.timeZone), 1)
  const noon = instantOfLocalTime(day, '12:00', YEAR_SITE.timeZone)
  if (new Date(noon).getUTCDay() === 0) return
  for (const wish of wishedCarries(people, { day, timeZone: YEAR_SITE.timeZone, nowMs: now })) {
    const boxes = takenBoxes(people, year.shelf)
    if (boxes.length === 0) continue
    for (const box of boxes) box.isTaken = true
    year.carries.push({ ...wish, boxes, code: `carry-${day}-${wish.kind}` })
  }
}

/** Now and then the maker tries a lid, and trues it where its grade is gone. */
const TRIES_LID = 0.15

function tryLid({ site }: SiteYear, people: Chance, box: ShelfBox, now: number): void {
  advance(box.truth, box.wood, site, 'cupboard', 'closed', now, HOUR_MS)
  if (!people.happens(TRIES_LID)) return
  if (lostMm(box.truth, box.wood, box.trueCut) >= box.truth.allowanceMm) retrued(people, box)
}

/** Whoever has just planned a carry sees its verdict. */
function lookAtPlans(year: SiteYear, people: Chance, now: number): void {
  const fresh = year.carries.filter(
    ({ state, kind, isSeen, madeAt }) =>
      state === 'planned' && kind === 'planned' && !isSeen && madeAt <= now,
  )
  if (fresh.length === 0) return
  const material = materialOf(year, now)
  for (const carry of fresh) {
    const checks = carry.boxes.map((box) => checkOf(material, box, ROOMS.shop, carry))
    heedPage(
      people,
      carry,
      checks.some((check) => check?.kind === 'verdict' && check.verdict === 'leave'),
    )
  }
}

function goAndReturn(year: SiteYear, people: Chance, now: number): void {
  for (const carry of year.carries) {
    if (carry.state === 'planned' && now >= carry.leavesAt) begin(year, people, carry, now)
    else if (carry.state === 'out' && now >= carry.backAt) end(year, carry, now)
  }
  if (year.carries.some(({ state }) => state === 'over'))
    year.carries = year.carries.filter(({ state }) => state !== 'over')
}

function begin(year: SiteYear, people: Chance, carry: YearCarry, now: number): void {
  for (const box of carry.boxes) advance(box.truth, box.wood, year.site, 'cupboard', 'closed', now, HOUR_MS)
  const material = materialOf(year, now)
  const answers = carry.boxes.map((box) => scoreCheck(year, material, box, carry, ROOMS.shop))
  if (carry.kind === 'planned') scorePlan(year.score, carry, answers, now)
  // Going now shows the same verdict, and is heeded as often.
  const worst = answers.some(({ verdict }) => verdict === 'leave') ? 'leave' : 'fine'
  if (carry.kind === 'now') heedAdvice(people, carry, { mark: worst, earlyAt: null })
  if (carry.isCalledOff) {
    carry.state = 'over'
    for (const box of carry.boxes) box.isTaken = false
    return
  }
  carry.state = 'out'
  carry.outAt = now
  const morning = daysAfter(dayOfInstant(new Date(now), YEAR_SITE.timeZone), 1)
  const morningAt = instantOfLocalTime(morning, '08:30', YEAR_SITE.timeZone)
  carry.backAt = ownReturnAt(people, carry, now, morningAt)
  carry.ownBackAt = carry.backAt
  carry.goneAt = answers.map(({ goneAt }) => goneAt)
  for (const box of carry.boxes) box.stays = moved(box.stays, { roomId: ROOMS.shop, cover: carry.cover }, now)
}

function end(year: SiteYear, carry: YearCarry, now: number): void {
  for (const box of carry.boxes) {
    advance(box.truth, box.wood, year.site, 'shop', carry.cover, now, OUT_STEP_MS)
    box.stays = moved(box.stays, { roomId: ROOMS.cupboard, cover: 'closed' }, now)
    box.isTaken = false
  }
  if (carry.isForgotten) scoreForgotten(year.score, carry)
  carry.state = 'over'
}

const moved = (
  stays: ShelfBox['stays'],
  to: Pick<ShelfBox['stays'][number], 'roomId' | 'cover'>,
  now: number,
): ShelfBox['stays'] => [
  ...stays.slice(-5).map((stay) => (stay.toAt === null ? { ...stay, toAt: new Date(now) } : stay)),
  { ...to, fromAt: new Date(now), toAt: null },
]

/** Often while something is out or about to go, seldom where nothing can change. */
function isTimeToDecide({ carries }: SiteYear, now: number): boolean {
  const isNear = carries.some(
    ({ state, kind, madeAt, plannedAt }) =>
      state === 'out' ||
      (state === 'planned' && kind === 'planned' && madeAt <= now && plannedAt - now <= 95 * MINUTE_MS),
  )
  return isNear || now % (30 * MINUTE_MS) === 0
}

const OUT_RULES: readonly string[] = ['time-nearly-out', 'time-out', 'lock-up', 'last-call']

function hear(
  year: SiteYear,
  people: Chance,
  notice: RoutedNotice,
  now: number,
  earlyAtOf: (carry: YearCarry) => number | null,
): void {
  const { score, carries } = year
  score.notices += 1
  score.byRule.set(notice.rule, (score.byRule.get(notice.rule) ?? 0) + 1)
  const isHeard = notice.deliveries.some(({ holdUntil }) => holdUntil === null)
  if (notice.rule === 'planned-carry' || notice.rule === 'verdict-worse') {
    const carry = carries.find(({ code }) => code === notice.carryCode)
    if (carry === undefined || !isHeard) return
    carry.warnedAt ??= now
    heedAdvice(people, carry, { mark: notice.mark, earlyAt: earlyAtOf(carry) })
  } else if (OUT_RULES.includes(notice.rule) && isHeard) {
    for (const carry of carries) {
      if (carry.state !== 'out') continue
      const boxes = carry.boxes.filter(({ code }) => [undefined, code].includes(notice.pieceCode))
      for (const box of boxes) if (!carry.calledAt.has(box.id)) carry.calledAt.set(box.id, now)
      if (boxes.length > 0) heedCall(people, carry, now)
    }
  }
}
