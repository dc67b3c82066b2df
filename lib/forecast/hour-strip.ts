import { judgedHour, judgedHours, leastForgiving, withForecast } from '@/lib/carry/better-hours'
import type { Verdict } from '@/lib/carry/carry-check'
import { airOfHour, type CarryMaterial } from '@/lib/carry/material'
import { HOUR_MS } from '@/lib/follow/record'
import { formatCount } from '@/lib/format/figures'
import { formatDuration } from '@/lib/format/times'
import { type Cover, coverWords } from '@/lib/pieces/piece'
import { FORECAST_HOURS, litForecast } from './room-forecast'
import type { HourState, HourStrip, StripCell } from './strip-view'
import { stripWords } from './strip-words'
import { TYPICAL_BOX_ID, TYPICAL_BOX_WORDS, typicalBox } from './typical-box'

/** What an hour is judged by where no other stay is asked about. Status: common practice, no source. */
const USUAL_STAY = { stayMinutes: 180, cover: 'open' } as const

const STATE_OF: Readonly<Record<Verdict, HourState>> = {
  fine: 'fit',
  'keep-short': 'tolerable',
  leave: 'unfit',
}

export interface HourStripAsked {
  roomId: number
  /** Of these the least forgiving one judges; none: a typical box. */
  pieceIds: readonly number[]
  /** The room that a typical box would be kept in. */
  keepRoomId: number | null
  timeZone: string
  /** How long they stay from the hour on, minutes, and how they sit there; left out: 3 h, open in work. */
  stay?: { stayMinutes: number; cover: Cover }
}

/**
 * The coming 48 hours of a room: fit where the least forgiving piece would keep its fit through the stay, tolerable
 * where it would for half an hour, else unfit; and what they would be if the room is lit at its usual hour.
 * Without a forecast the last two days stand in, and no hour is called fit; with nothing fresh read there are no cells.
 *
 * Quick, because each hour is followed for the stay alone, and by one piece: the one that loses most there now.
 */
export function hourStrip(material: CarryMaterial, asked: HourStripAsked): HourStrip {
  const { timeZone } = asked
  const clock = { timeZone, now: material.now }
  const room = material.rooms.get(asked.roomId)
  const judge = judgeOf(material, asked)
  const none = (note: string): HourStrip => {
    const strip = { kind: 'none' as const, cells: [], lit: null }
    return { ...strip, words: stripWords(strip, clock), note }
  }
  if (room === undefined || room.air.kind !== 'fresh') return none('')
  if (judge === undefined) return none('Nothing is known yet of the air that boxes are kept in.')
  const forecast = room.forecast ?? null
  const cells =
    forecast === null ? repeatedCells(judge, asked) : forecastCells(judge, asked, litMaterial(judge, asked))
  if (cells.length === 0) return none('')
  const warmed = forecast?.warmed ?? null
  const strip = {
    kind: forecast === null ? ('repeated' as const) : ('forecast' as const),
    cells,
    lit: warmed === null ? null : { atTime: warmed.litAtTime, warmings: warmed.warmings },
  }
  const lightings =
    strip.lit === null
      ? ''
      : ` Lit hours: from the room’s own ${formatCount(strip.lit.warmings, 'warming')} on record, give or take an hour.`
  return { ...strip, words: stripWords(strip, clock), note: `${judge.words}${lightings}` }
}

interface Judge {
  material: CarryMaterial
  pieceId: number
  words: string
}

const stayOf = (pieceIds: readonly number[], { roomId, stay = USUAL_STAY }: HourStripAsked) => ({
  pieceIds,
  toRoomId: roomId,
  ...stay,
})

/** "going for 3 h, open in work" */
const stayWords = ({ stay = USUAL_STAY }: HourStripAsked): string =>
  `going for ${formatDuration(stay.stayMinutes)}, ${coverWords[stay.cover]}`

/** The piece that would have lost most by the end of the stay from now; a typical box where there is none. */
function judgeOf(material: CarryMaterial, asked: HourStripAsked): Judge | undefined {
  const { pieceIds, keepRoomId } = asked
  const least = leastForgiving(material, stayOf(pieceIds, asked), material.now.getTime())
  if (least !== undefined) {
    const number = material.pieces.get(least.pieceId)?.facts.number ?? ''
    const of = least.of === 1 ? '' : `, the least forgiving of ${String(least.of)} boxes`
    return {
      material,
      pieceId: least.pieceId,
      words: `Judged by ${number}${of}, ${stayWords(asked)}.`,
    }
  }
  if (keepRoomId === null || (material.rooms.get(keepRoomId)?.emcPctMean ?? null) === null) return undefined
  const pieces = new Map(material.pieces).set(TYPICAL_BOX_ID, typicalBox(keepRoomId))
  return {
    material: { ...material, pieces },
    pieceId: TYPICAL_BOX_ID,
    words: `Judged by ${TYPICAL_BOX_WORDS}, ${stayWords(asked)}.`,
  }
}

function litMaterial({ material }: Judge, { roomId }: HourStripAsked): CarryMaterial {
  const forecast = material.rooms.get(roomId)?.forecast
  return forecast ? withForecast(material, roomId, litForecast(forecast)) : material
}

function forecastCells({ material, pieceId }: Judge, asked: HourStripAsked, lit: CarryMaterial): StripCell[] {
  const hourAt = Math.floor(material.now.getTime() / HOUR_MS) * HOUR_MS
  const stay = stayOf([pieceId], asked)
  return judgedHours(material, { ...stay, fromAt: new Date(hourAt) }).flatMap(({ asItIs, ifLit }) => {
    const at = new Date(asItIs.startsAt).getTime()
    const air = airOfHour(material, asked.roomId, Math.max(at, material.now.getTime()))
    const litAir = ifLit === null ? undefined : airOfHour(lit, asked.roomId, at)
    if (air === undefined) return []
    return {
      at: asItIs.startsAt,
      state: STATE_OF[asItIs.worst],
      ...air,
      ifLit: ifLit === null || litAir === undefined ? null : { state: STATE_OF[ifLit.worst], ...litAir },
    }
  })
}

/** The last two days over again. What came once is no promise: fit is told as tolerable. */
function repeatedCells({ material, pieceId }: Judge, asked: HourStripAsked): StripCell[] {
  const hourAt = Math.floor(material.now.getTime() / HOUR_MS) * HOUR_MS
  const hours = material.rooms.get(asked.roomId)?.hours
  const stay = stayOf([pieceId], asked)
  return Array.from({ length: FORECAST_HOURS }, (_, n) => n).flatMap((n) => {
    const at = hourAt + n * HOUR_MS
    const before = hours?.get(at - FORECAST_HOURS * HOUR_MS)
    const judged = before && judgedHour(material, stay, at, null)
    if (judged === undefined) return []
    const state = STATE_OF[judged.worst]
    return {
      at: new Date(at).toISOString(),
      state: state === 'fit' ? ('tolerable' as const) : state,
      emcPct: before?.emcPct ?? judged.emcPct,
      temperatureC: before?.temperatureC ?? 0,
      ifLit: null,
    }
  })
}
