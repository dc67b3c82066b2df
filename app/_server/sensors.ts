import 'server-only'
import type { Kysely } from 'kysely'
import { findIngestCounts } from '@/db/queries/ingest-counts'
import type { SiteMember } from '@/db/queries/members'
import { listPlacements } from '@/db/queries/placements'
import { countRefusedBySensor } from '@/db/queries/refused-today'
import { loadRuleBook } from '@/db/queries/rules'
import { findSensor, listSensorRecords, type SensorRecord } from '@/db/queries/sensors'
import type { Database } from '@/db/schema'
import { dayOfInstant } from '@/lib/climate/days'
import { signInNameOf, topicOf } from '@/lib/readings/topic'
import type { RuleBook } from '@/lib/notices/rule-settings'
import { ok } from '@/lib/result'
import type { Sensor, SensorCredential, SensorDetail } from '@/lib/sensors/sensor'
import { sensorClock, sensorState } from '@/lib/sensors/state'
import { serverConfig } from './env'
import { notThere, type Outcome } from './problem'

const instant = (at: Date | null): string | null => at?.toISOString() ?? null

function sensorView(sensor: SensorRecord, refusedToday: number, now: Date, rules: RuleBook): Sensor {
  return {
    id: sensor.code,
    name: sensor.name,
    kind: sensor.kind,
    state: sensorState(sensor, now, rules),
    room:
      sensor.room === null ? null : { id: sensor.room.code, name: sensor.room.name, mark: sensor.room.mark },
    spot: sensor.spot,
    last: sensor.last === null ? null : { ...sensor.last, at: sensor.last.at.toISOString() },
    heardAt: instant(sensor.heardAt),
    usualGapS: sensor.usualGapS,
    batteryPct: sensor.batteryPct,
    clock: sensorClock(sensor, now),
    refusedToday,
    version: sensor.version,
    createdAt: sensor.createdAt.toISOString(),
  }
}

/** The sensors in use, and behind them those that were retired. */
export async function listSensors(db: Kysely<Database>, member: SiteMember, now: Date): Promise<Sensor[]> {
  const todayOn = dayOfInstant(now, member.timeZone)
  const [records, refused, rules] = await Promise.all([
    listSensorRecords(db, member.siteId, { withArchived: true }),
    countRefusedBySensor(db, member.siteId, todayOn),
    loadRuleBook(db, member.siteId),
  ])
  return records.map((record) => sensorView(record, refused.get(record.id) ?? 0, now, rules))
}

export async function getSensor(
  db: Kysely<Database>,
  member: SiteMember,
  sensorCode: string,
  now: Date,
): Promise<Outcome<SensorDetail>> {
  const sensor = await findSensor(db, member.siteId, sensorCode)
  if (sensor === undefined) return notThere()
  const todayOn = dayOfInstant(now, member.timeZone)
  const [placements, counts, rules] = await Promise.all([
    listPlacements(db, member.siteId, sensor.id),
    findIngestCounts(db, member.siteId, sensor.id, todayOn),
    loadRuleBook(db, member.siteId),
  ])
  return ok({
    ...sensorView(sensor, counts.get('refused') ?? 0, now, rules),
    ...addressOf(member, sensor.code),
    placements: placements.map(({ room, fromAt, toAt, spot }) => ({
      room: { id: room.code, name: room.name, mark: room.mark },
      fromAt: fromAt.toISOString(),
      toAt: instant(toAt),
      spot,
    })),
    counts: Object.fromEntries(counts),
  })
}

/** Where a sensor publishes, and under which name. */
export function addressOf(member: SiteMember, sensorCode: string): Omit<SensorCredential, 'secret'> {
  const { mqttHost, mqttPort } = serverConfig()
  return {
    topic: topicOf(member.siteCode, sensorCode, 'reading'),
    signInName: signInNameOf(member.siteCode, sensorCode),
    broker: { host: mqttHost, port: mqttPort },
  }
}
