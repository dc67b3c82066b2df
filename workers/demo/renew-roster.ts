import type { Kysely } from 'kysely'
import { listDemoSensors, renewDemoSecret, type DemoSiteState } from '@/db/queries/demo'
import type { Database } from '@/db/schema'
import { makeSensorSecret } from '@/db/sensor-secret'
import type { DemoRoster, DemoSensor } from '@/lib/sensors/demo-roster'
import { placeSeed, placeSensors } from './place'

/**
 * The roster of a demo whose file was lost: secrets are stored nowhere else, so its sensors get new ones. A sensor
 * that a visitor renamed is not known again, and stays silent.
 */
export async function renewRoster(db: Kysely<Database>, site: DemoSiteState, now: Date): Promise<DemoRoster> {
  const sensors: DemoSensor[] = []
  for (const { id, code, name, lastAt, batteryPct } of await listDemoSensors(db, site.id)) {
    const known = placeSensors.find((one) => one.name === name)
    if (known === undefined) continue
    const { secret, hash } = await makeSensorSecret()
    await renewDemoSecret(db, site.id, id, hash, now)
    const { model, everyS, habit } = known
    sensors.push({
      code,
      model,
      secret,
      everyS,
      habit,
      lastAt: (lastAt ?? now).toISOString(),
      batteryPct: batteryPct ?? known.batteryPct,
    })
  }
  return { siteCode: site.code, seed: placeSeed, sensors }
}
