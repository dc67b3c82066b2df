import type { Transaction } from 'kysely'
import { updateDemoHours } from '@/db/queries/demo'
import { upsertRule } from '@/db/queries/rules'
import type { Database } from '@/db/schema'
import { formatClock } from '@/lib/format/times'
import { lastCallBeforeQuietMs } from '@/lib/notices/policy'
import type { ScenarioName } from '@/lib/sensors/scenarios'
import type { MadePlace } from './make-place'
import { placeTimeZone } from './place'

const minuteMs = 60_000
/** What goes by the clock comes up so soon after the demo is made. */
const soonMs = 2 * minuteMs

/**
 * Sets the place's clock times and rules so that what a scenario is about comes up within minutes. What the air, the
 * pieces and the sensors do for it is in their own parts; most scenarios need nothing here.
 */
export async function setStage(
  trx: Transaction<Database>,
  place: MadePlace,
  scenario: ScenarioName,
  now: Date,
): Promise<void> {
  const clock = (ms: number) => formatClock(new Date(now.getTime() + ms), placeTimeZone)
  const rule = async (change: Pick<Parameters<typeof upsertRule>[2], 'rule' | 'settings'>) => {
    await upsertRule(trx, place.siteId, { ...change, isOn: true, version: 1, userId: place.users.maker }, now)
  }
  switch (scenario) {
    case 'lock-up':
      return updateDemoHours(trx, place.siteId, { lockUpAt: clock(soonMs) })
    case 'last-call': {
      const quietMs = soonMs + lastCallBeforeQuietMs
      return updateDemoHours(trx, place.siteId, {
        lockUpAt: clock(-10 * minuteMs),
        quietFrom: clock(quietMs),
        quietTo: clock(quietMs + 8 * 60 * minuteMs),
      })
    }
    case 'shop-unfit':
      return rule({ rule: 'shop-unfit', settings: { at: clock(0) } })
    case 'good-hours':
      return rule({ rule: 'good-hours', settings: { at: clock(0), kind: 'tolerable', hours: 1 } })
    default:
      return
  }
}
