import { dayOfInstant, daysAfter } from '@/lib/climate/days'
import type { RoutedNotice } from '@/lib/notices/inputs'
import { instantOfLocalTime } from '@/lib/sites/local-time'
import type { Chance } from './chance'
import { scoreCheck, scoreForgotten, scorePlan } from './judge-carry'
import {
  heedAdvice,
  heedCall,
  heedPage,
  ownReturnAt,
  takenBoxes,
  wishedCarries,
  type YearCarry,
} from './maker'
import { retrued, type ShelfBox } from './shelf'
import { materialOf, ROOMS, type SiteYear } from './site'
import { checkOf, type SiteNotices, YEAR_SITE } from './site-notices'
import { advance, lostMm, OUT_STEP_MS } from './truth-box'

const HOUR_MS = 3_600_000

/** Plans of the next working day. */
export function makePlans(year: SiteYear, people: Chance, now: number): void {
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

export function tryLid({ site }: SiteYear, people: Chance, box: ShelfBox, now: number): void {
  advance(box.truth, box.wood, site, 'cupboard', 'closed', now, HOUR_MS)
  if (!people.happens(TRIES_LID)) return
  if (lostMm(box.truth, box.wood, box.trueCut) >= box.truth.allowanceMm) retrued(people, box)
}

/** Whoever has just planned a carry sees its verdict. */
export function lookAtPlans(year: SiteYear, people: Chance, now: number): void {
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

export function goAndReturn(year: SiteYear, people: Chance, now: number): void {
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
  year.today.carries += 1
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
  year.today.carries += 1
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

const OUT_RULES: readonly string[] = ['time-nearly-out', 'time-out', 'lock-up', 'last-call']

/** What people make of a notice, as far as it reaches anybody at once. */
export function hear(
  year: SiteYear,
  people: Chance,
  notice: RoutedNotice,
  now: number,
  notices: Pick<SiteNotices, 'earlyAt' | 'answer'>,
): void {
  const { score, carries } = year
  score.notices += 1
  score.byRule.set(notice.rule, (score.byRule.get(notice.rule) ?? 0) + 1)
  if (!notice.deliveries.some(({ holdUntil }) => holdUntil === null)) return
  if (notice.rule === 'planned-carry' || notice.rule === 'verdict-worse') {
    const carry = carries.find(({ code }) => code === notice.carryCode)
    if (carry === undefined) return
    carry.warnedAt ??= now
    heedAdvice(people, carry, { mark: notice.mark, earlyAt: notices.earlyAt(carry) })
  } else if (OUT_RULES.includes(notice.rule)) {
    const out = carries.filter(({ state }) => state === 'out')
    if (out.length === 0) {
      year.today.isAnswered = true
      notices.answer(notice, 'nothing', now)
    }
    for (const carry of out) {
      const boxes = carry.boxes.filter(({ code }) => [undefined, code].includes(notice.pieceCode))
      for (const box of boxes) if (!carry.calledAt.has(box.id)) carry.calledAt.set(box.id, now)
      if (boxes.length > 0 && heedCall(people, carry, now)) notices.answer(notice, 'going', now)
    }
  }
}
