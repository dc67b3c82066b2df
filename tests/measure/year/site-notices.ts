import type { CarryMaterial } from '@/lib/carry/material'
import { carryCheckInput } from '@/lib/carry/material'
import { carryCheck } from '@/lib/carry/check'
import type { PieceCheck } from '@/lib/carry/carry-check'
import { decideNotices } from '@/lib/notices/decide'
import type {
  NoticeCarry,
  NoticeInputs,
  NoticePerson,
  NoticeSensor,
  RoutedNotice,
} from '@/lib/notices/inputs'
import { freshForMs, silentAfterMs } from '@/lib/notices/policy'
import type { LastReading } from '@/lib/rooms/air'
import type { YearCarry } from './maker'
import { type NoticeMemory, noticeMemory } from './notice-memory'
import type { ShelfBox } from './shelf'
import { isSlowLook, SLOW_RULES, surroundingsOf, type Yard } from './surroundings-of'

/** The site's people and hours: the product's defaults. */
export const YEAR_SITE = {
  timeZone: 'Europe/London',
  quietFrom: '22:00',
  quietTo: '07:00',
  lockUpAt: '18:00',
} as const

const PEOPLE: NoticePerson[] = [
  { userId: 'maker', role: 'owner', mailOn: true, onHouseList: false },
  { userId: 'house', role: 'hand', mailOn: true, onHouseList: true },
]

export interface HangingSensor {
  code: string
  roomName: string
  isKeepingRoom: boolean
  isCarriedTo: boolean
  last: LastReading | null
}

/** One check of one box, judged as page, API and worker judge it. */
export function checkOf(
  material: CarryMaterial,
  box: ShelfBox,
  shopId: number,
  carry: Pick<YearCarry, 'cover' | 'stayMinutes' | 'outAt' | 'plannedAt'>,
): PieceCheck | null {
  const input = carryCheckInput(material, {
    pieceId: box.id,
    toRoomId: shopId,
    startsAt: new Date(carry.outAt ?? carry.plannedAt),
    stayMinutes: carry.stayMinutes,
    cover: carry.cover,
  })
  return input === undefined ? null : carryCheck(input)
}

/** The product's deciding at one site. */
export interface SiteNotices {
  readonly decide: (
    now: number,
    material: CarryMaterial,
    carries: readonly YearCarry[],
    sensors: readonly HangingSensor[],
    yard: Yard,
  ) => RoutedNotice[]
  readonly answer: NoticeMemory['answer']
  /** The earliest of a carry's early edges as last judged, epoch ms; null where none was told. */
  readonly earlyAt: (carry: YearCarry) => number | null
}

export function siteNotices(shopId: number): SiteNotices {
  const memory = noticeMemory()
  const surroundings = surroundingsOf(YEAR_SITE.timeZone)
  const checks = new Map<string, { asked: string; check: PieceCheck | null }>()

  /** The same reading and the same question give the same answer: worked out once. */
  const cachedCheck = (
    material: CarryMaterial,
    box: ShelfBox,
    carry: YearCarry,
    airAt: number | null,
  ): PieceCheck | null => {
    const key = `${carry.code} ${box.code}`
    const asked = [airAt, carry.outAt, carry.stayMinutes, material.rooms.get(shopId)?.air.kind].join(' ')
    const before = checks.get(key)
    if (before?.asked === asked) return before.check
    const check = checkOf(material, box, shopId, carry)
    checks.set(key, { asked, check })
    return check
  }

  const noticeCarry = (material: CarryMaterial, carry: YearCarry): NoticeCarry => {
    const air = material.rooms.get(shopId)?.air
    const airAt = air === undefined || air.kind === 'never' ? null : new Date(air.at).getTime()
    return {
      code: carry.code,
      state: carry.state === 'out' ? 'out' : 'planned',
      plannedAt: carry.plannedAt,
      stayMinutes: carry.stayMinutes,
      roomName: 'Shop',
      madeBy: 'maker',
      airAt,
      pieces: carry.boxes.map((box) => ({
        code: box.code,
        number: box.facts.number,
        stage: box.facts.stage,
        outAt: carry.outAt,
        check: cachedCheck(material, box, carry, airAt),
      })),
    }
  }

  return {
    earlyAt(carry) {
      const edges = carry.boxes.flatMap((box) => {
        const check = checks.get(`${carry.code} ${box.code}`)?.check
        return check?.kind === 'verdict' && check.earlyAt !== null ? [new Date(check.earlyAt).getTime()] : []
      })
      return edges.length === 0 ? null : Math.min(...edges)
    },
    answer: memory.answer,
    decide(now, material, carries, sensors, yard) {
      const open = carries.filter(
        ({ state, kind, madeAt, isCalledOff }) =>
          state === 'out' || (state === 'planned' && kind === 'planned' && madeAt <= now && !isCalledOff),
      )
      const inputs: NoticeInputs = {
        site: { ...YEAR_SITE },
        carries: open.map((carry) => noticeCarry(material, carry)),
        sensors: sensors.map((sensor) => noticeSensor(sensor, now, open)),
        people: PEOPLE,
        surroundings: surroundings(material, yard),
      }
      const decision = decideNotices(now, memory.state(), inputs)
      memory.keep(now, decision, (rule) => isSlowLook(now) || !SLOW_RULES.has(rule))
      if (open.length === 0) checks.clear()
      return decision.notices
    },
  }
}

function noticeSensor(sensor: HangingSensor, now: number, open: readonly YearCarry[]): NoticeSensor {
  const heardAt = sensor.last?.at.getTime() ?? null
  const usualGapS = sensor.last?.usualGapS ?? null
  const freshMs = freshForMs({ isKeepingRoom: sensor.isKeepingRoom, isTyped: false, usualGapS })
  const isAirKnown = heardAt !== null && now - heardAt <= freshMs
  return {
    code: sensor.code,
    name: `${sensor.roomName} sensor`,
    roomName: sensor.roomName,
    lastHeardAt: heardAt,
    freshUntil: heardAt === null ? null : heardAt + freshMs,
    silentFrom: heardAt === null ? null : heardAt + silentAfterMs(usualGapS),
    piecesOutThere:
      isAirKnown || !sensor.isCarriedTo
        ? []
        : open
            .filter(({ state }) => state === 'out')
            .flatMap(({ boxes }) => boxes.map(({ facts }) => facts.number)),
  }
}
