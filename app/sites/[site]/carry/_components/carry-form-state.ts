'use client'

import { parseAsArrayOf, parseAsInteger, parseAsString, parseAsStringLiteral, useQueryStates } from 'nuqs'
import type { CarryCheckRequest } from '@/lib/carry/carry-answer'
import { type ToldAir, toldAirSchema } from '@/lib/carry/told-air'
import type { Cover, Piece } from '@/lib/pieces/piece'
import type { Room } from '@/lib/rooms/room'
import { instantOfLocalField } from '@/lib/format/local-time'
import type { UnitSystem } from '@/lib/sites/site'
import { celsiusFromFahrenheit } from '@/lib/units'

export const covers = ['open', 'lid-on', 'bagged', 'tub'] as const satisfies readonly Cover[]

/** How long ago something went that was not logged then, in minutes. */
export const sinces = [0, 10, 30, 60, 120, 240, 480] as const

const parsers = {
  mode: parseAsStringLiteral(['now', 'plan']).withDefault('now'),
  pieces: parseAsArrayOf(parseAsString).withDefault([]),
  to: parseAsString,
  /** Air as told, where it goes to no room of the site: as typed, in the reader's own units. */
  place: parseAsString.withDefault(''),
  temperature: parseAsString.withDefault(''),
  humidity: parseAsString.withDefault(''),
  /** The planned time as its field has it, in the site's zone. */
  at: parseAsString,
  stay: parseAsInteger.withDefault(120),
  since: parseAsInteger.withDefault(0),
  cover: parseAsStringLiteral(covers).withDefault('open'),
}

/** What stands in the sentence. It is in the address, so that a question can be kept and sent. */
export const useCarryForm = () => useQueryStates(parsers, { history: 'replace' })

export type CarryForm = ReturnType<typeof useCarryForm>[0]
export type SetCarryForm = ReturnType<typeof useCarryForm>[1]

/** Stands for "another air …" among the rooms. */
export const OTHER_AIR = 'other-air'

const typedNumber = (text: string): number =>
  text.trim() === '' ? Number.NaN : Number(text.trim().replace(',', '.').replace('−', '-'))

/** The air that was typed, once it is whole and can be. */
export function toldAirOf(form: CarryForm, units: UnitSystem): ToldAir | undefined {
  const temperature = typedNumber(form.temperature)
  const told = toldAirSchema.safeParse({
    name: form.place,
    temperatureC: units === 'metric' ? temperature : celsiusFromFahrenheit(temperature),
    humidityPct: typedNumber(form.humidity),
  })
  return told.success ? told.data : undefined
}

const SHOP_FIRST = ['shop', 'store', 'outdoor', 'van', 'house', 'cupboard', 'tub']

/** The room that is asked about when none was named: the shop, for that is where boxes are lost. */
export function roomOf(rooms: readonly Room[], code: string | null): Room | undefined {
  const named = rooms.find((room) => room.id === code)
  return named ?? rooms.toSorted((a, b) => SHOP_FIRST.indexOf(a.kind) - SHOP_FIRST.indexOf(b.kind))[0]
}

type Question = {
  form: CarryForm
  chosen: readonly Piece[]
  room: Room | undefined
  units: UnitSystem
  timeZone: string
  now: Date
  defaultAt: string
}

/** The question that the sentence asks, or nothing while it is not whole. */
export function requestOf(question: Question): CarryCheckRequest | null {
  const { form, chosen, room, units, timeZone, now, defaultAt } = question
  const toAir = form.to === OTHER_AIR ? toldAirOf(form, units) : undefined
  const where = form.to === OTHER_AIR ? toAir && { toAir } : room && { toRoomId: room.id }
  if (where === undefined || chosen.length === 0) return null
  const stayMinutes = Math.min(43_200, Math.max(1, form.stay))
  const common = {
    pieceIds: chosen.map((piece) => piece.id),
    ...where,
    stayMinutes,
    cover: form.cover,
  }
  if (form.mode === 'now') {
    if (form.since <= 0) return common
    return { ...common, startsAt: new Date(now.getTime() - form.since * 60_000).toISOString() }
  }
  const at = instantOfLocalField(form.at ?? defaultAt, timeZone)
  return at === undefined ? null : { ...common, startsAt: at.toISOString() }
}
