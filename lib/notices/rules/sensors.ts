import { dayOfInstant, startOfDayOf } from '@/lib/climate/days'
import { formatCount } from '@/lib/format/figures'
import { grouped } from '../grouped'
import type { NoticeInputs, NoticeState, RulePart } from '../inputs'
import { makers, recipients } from '../people'
import { batteryClearPct } from '../policy'
import { choiceOf } from '../rule-settings'
import { coinCellCaution, listed } from '../wording'
import { groupNotice } from './pieces'

const nothing: RulePart = { episodes: [], notices: [] }

/** Sensors whose battery is nearly empty: told once, and anew only after it was changed or charged. */
export function batteryLow(now: number, state: NoticeState, inputs: NoticeInputs): RulePart {
  const { values, isOn } = choiceOf(inputs.rules, 'battery-low')
  if (!isOn) return nothing
  const open = new Set(
    (state.known ?? [])
      .filter((one) => one.rule === 'battery-low' && one.isOpen)
      .map(({ subject }) => subject),
  )
  const low = inputs.sensors.flatMap((sensor) => {
    const { batteryPct } = sensor
    const subject = `sensor ${sensor.code}`
    if (batteryPct === undefined || batteryPct === null) return []
    const limit = values.pct + (open.has(subject) ? batteryClearPct : 0)
    return batteryPct <= limit ? [{ ...sensor, batteryPct, subject }] : []
  })
  const { episodes, toTell } = grouped(now, state, 'battery-low', low, 0)
  if (toTell.length === 0) return { episodes, notices: [] }
  const [first] = toTell
  const isOne = toTell.length === 1
  const charges = toTell.map(
    ({ name, batteryPct }) => `${name} at ${String(Math.round(batteryPct))} % of its charge`,
  )
  return {
    episodes,
    notices: [
      {
        ...groupNotice('battery-low', toTell, episodes),
        urgency: 'whenever',
        mark: 'silent',
        title: `${isOne ? 'A battery is' : 'Batteries are'} nearly empty: ${listed(charges)}.`,
        body: `Change ${isOne ? 'it' : 'them'} before ${isOne ? 'it falls' : 'they fall'} silent. ${coinCellCaution}`,
        link: isOne && first !== undefined ? `/sensors/${first.code}` : '/sensors',
        ...(isOne && first !== undefined ? { sensorCode: first.code } : {}),
        to: recipients(makers(inputs.people)),
      },
    ],
  }
}

/** Messages that could not be used: told once a day, whatever their number. */
export function refusedMessages(now: number, state: NoticeState, inputs: NoticeInputs): RulePart {
  const { values, isOn } = choiceOf(inputs.rules, 'refused-messages')
  if (!isOn) return nothing
  const today = dayOfInstant(new Date(now), inputs.site.timeZone)
  const episodeName = { rule: 'refused-messages', subject: 'site', key: today } as const
  const isOpen = (state.known ?? []).some(
    (one) => one.rule === episodeName.rule && one.key === today && one.subject === 'site',
  )
  const bad = (inputs.surroundings?.refused ?? []).filter(
    (one) => one.today > 0 && (isOpen || !one.isOldNews || one.lastHour >= values.perHour),
  )
  if (bad.length === 0) return nothing
  const [first] = bad
  const told = bad.map(({ sensorName, today: n }) => `${sensorName} (${formatCount(n, 'message')})`)
  return {
    episodes: [
      {
        ...episodeName,
        state: 'telling',
        beganAt: startOfDayOf(new Date(now), inputs.site.timeZone).getTime(),
      },
    ],
    notices: [
      {
        key: `refused-messages/${today}`,
        rule: episodeName.rule,
        urgency: 'whenever',
        mark: 'unknown',
        title: `Messages of ${listed(told)} could not be used today.`,
        body: 'They are kept with the reason. Often it is a clock that was not set, or a value out of range.',
        link: bad.length === 1 && first !== undefined ? `/sensors/${first.sensorCode}` : '/sensors',
        episode: episodeName,
        ...(bad.length === 1 && first !== undefined ? { sensorCode: first.sensorCode } : {}),
        to: recipients(makers(inputs.people)),
      },
    ],
  }
}
