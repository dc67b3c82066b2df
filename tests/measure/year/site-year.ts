import { woodOfPiece } from '@/lib/carry/joint-defaults'
import { dayOfInstant } from '@/lib/climate/days'
import { UNLEARNED_PACE } from '@/lib/follow/learned-pace'
import { airsOf, followOn } from '@/lib/follow/record'
import { instantOfLocalTime } from '@/lib/sites/local-time'
import { chanceOf } from './chance'
import { roomRecord } from './record'
import { newScore, type YearScore } from './score'
import { READING_GAP_MS, yearSensor } from './sensors'
import { type ShelfBox, shelfBox } from './shelf'
import { shopForecasts } from './shop-forecast'
import { materialOf, ROOMS, type SiteYear } from './site'
import { type HangingSensor, siteNotices, YEAR_SITE } from './site-notices'
import { goAndReturn, hear, lookAtPlans, makePlans, tryLid } from './site-people'
import { truthAir } from './truth-air'
import type { TrueSite } from './truth-box'
import { trueEmcPct } from './truth-emc'

const MINUTE_MS = 60_000
const HOUR_MS = 60 * MINUTE_MS
const DAY_MS = 24 * HOUR_MS
const TICK_MS = 5 * MINUTE_MS
/** Of record before anything is carried, so that rooms have a middle and forecasts something to go by. */
const LEAD_DAYS = 30
const BOXES = 24
const START_ON = '2026-01-05'

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
  const today = { dayOn: '', carries: 0, isAnswered: false }
  const year: SiteYear = { site, rooms, forecasts, shelf: [], carries: [], score, today }
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
      const dayOn = dayOfInstant(new Date(now), YEAR_SITE.timeZone)
      if (dayOn !== year.today.dayOn) year.today = { dayOn, carries: 0, isAnswered: false }
      followShelf(year, now)
      year.forecasts.hour(now, air.isWarmed, isNear(year, now + HOUR_MS))
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
    if (!isTimeToDecide(year, now)) continue
    const yard = {
      rooms,
      shelf: year.shelf,
      carriesToday: year.today.carries,
      isAnswered: year.today.isAnswered,
    }
    const told = notices.decide(now, materialOf(year, now), year.carries, sensorsOf(year), yard)
    for (const notice of told) hear(year, people, notice, now, notices)
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

/** Something is out or about to go. */
const isNear = ({ carries }: SiteYear, now: number): boolean =>
  carries.some(
    ({ state, madeAt, plannedAt }) =>
      state === 'out' || (state === 'planned' && madeAt <= now && plannedAt - now <= 95 * MINUTE_MS),
  )

/** Often then, seldom where nothing can change. */
const isTimeToDecide = (year: SiteYear, now: number): boolean => isNear(year, now) || now % HOUR_MS === 0
