import type { Kysely } from 'kysely'
import { insertDemoArrivals, markDemoComplete, updateDemoSensorState } from '@/db/queries/demo'
import { followPieces } from '@/db/queries/follow-pieces'
import type { Database } from '@/db/schema'
import { topicOf } from '@/lib/readings/topic'
import type { DemoRoster } from '@/lib/sensors/demo-roster'
import type { ScenarioName } from '@/lib/sensors/scenarios'
import { dayOfInstant } from '@/lib/climate/days'
import { insertHistory } from './history'
import { makeNotices } from './notices'
import { makePieces } from './make-pieces'
import { makeWeighings } from './make-weighings'
import { makePlace, type MadePlace, type MadeSensor } from './make-place'
import { historyDays, placeSeed, placeSensors, placeTimeZone, type PlaceSensor } from './place'
import { settleJoints } from './settle-joints'
import { setStage } from './stage'

export interface DemoOptions {
  now: Date
  /** How much past it gets; a test may do with less. */
  days?: number
  /** How far apart its readings are, seconds; a test may do with fewer. */
  everyS?: number
  /** The course of events that it starts in. */
  scenario?: ScenarioName
  say: (sentence: string) => void
  /** Given the roster of its sensors before the demo counts as complete. */
  keepRoster: (roster: DemoRoster) => Promise<void>
}

const minuteMs = 60_000

/** Makes the whole demo. What is half made when this ends early is found and made anew at the next start. */
export async function makeDemo(
  db: Kysely<Database>,
  { now, days = historyDays, everyS, scenario, say, keepRoster }: DemoOptions,
): Promise<MadePlace> {
  say('Making the demo: people, rooms and sensors')
  const place = await makePlace(db, now, days)
  await insertHistory(db, {
    siteId: place.siteId,
    sensorIds: new Map([...place.sensors].map(([model, { id }]) => [model, id])),
    now,
    days,
    everyS,
    scenario,
    onProgress: progressInQuarters(days, say),
  })
  for (const sensor of placeSensors) await settleSensor(db, place, sensor, now)

  say('Making the demo: pieces, carries and notices')
  await db.transaction().execute(async (trx) => {
    const made = await makePieces(trx, place, now)
    const site = { siteId: place.siteId, timeZone: placeTimeZone }
    await followPieces(trx, site, null, now)
    const unsettled = await settleJoints(trx, place, made, now, scenario)
    if (unsettled.length > 0) say(`In this season no joint tells the whole story of ${unsettled.join(', ')}.`)
    await makeWeighings(trx, place, made, now)
    // Settling changed the joints of some: and weights tell more of others: their wood is followed anew.
    await followPieces(trx, site, null, now)
    await makeNotices(trx, place, made, now)
    await makeArrivals(trx, place, now)
    if (scenario !== undefined) await setStage(trx, place, scenario, now)
    await keepRoster(rosterOf(place, now))
    await markDemoComplete(trx, place.siteId, place.siteCode, now)
  })
  return place
}

function progressInQuarters(days: number, say: DemoOptions['say']): (share: number, n: number) => void {
  let told = 0
  return (share, n) => {
    const quarter = Math.floor(share * 4)
    if (quarter <= told) return
    told = quarter
    say(
      `Making the demo: ${String(days)} days of readings, ${String(quarter * 25)} % (${n.toLocaleString('en-GB')})`,
    )
  }
}

const madeSensor = (place: MadePlace, { model }: PlaceSensor): MadeSensor => {
  const made = place.sensors.get(model)
  if (made === undefined) throw new RangeError(`no sensor was made for ${model}`)
  return made
}

const endOf = (sensor: PlaceSensor, now: Date): Date =>
  new Date(now.getTime() - sensor.endsMinutesAgo * minuteMs)

const settleSensor = (db: Kysely<Database>, place: MadePlace, sensor: PlaceSensor, now: Date) =>
  updateDemoSensorState(db, place.siteId, {
    sensorId: madeSensor(place, sensor).id,
    heardAt: endOf(sensor, now),
    isHere: sensor.habit === 'steady',
    batteryPct: sensor.batteryPct,
    usualGapS: sensor.everyS,
  })

/** One sensor caught up late today, and another sent something that could not be used. */
async function makeArrivals(db: Kysely<Database>, place: MadePlace, now: Date): Promise<void> {
  const late = place.sensors.get('study')
  const faulty = place.sensors.get('shop-door')
  if (late === undefined || faulty === undefined) throw new RangeError('two sensors with a story')
  const at = new Date(now.getTime() - 190 * minuteMs)
  await insertDemoArrivals(db, place.siteId, {
    late: { sensorId: late.id, dayOn: dayOfInstant(now, placeTimeZone), n: 21 },
    refused: {
      sensorId: faulty.id,
      at,
      topic: topicOf(place.siteCode, faulty.code, 'reading'),
      message: JSON.stringify({ at: at.toISOString(), temperatureC: 85, humidityPct: 71.2, batteryPct: 93 }),
      reason: 'sensor-fault',
      field: 'temperatureC',
      detail: '85',
    },
  })
}

const rosterOf = (place: MadePlace, now: Date): DemoRoster => ({
  siteCode: place.siteCode,
  seed: placeSeed,
  storyFrom: now.toISOString(),
  sensors: placeSensors.map((sensor) => {
    const { code, secret } = madeSensor(place, sensor)
    const { model, everyS, habit, batteryPct } = sensor
    return { code, model, secret, everyS, habit, batteryPct, lastAt: endOf(sensor, now).toISOString() }
  }),
})
