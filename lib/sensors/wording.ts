import { formatCount, formatEmc } from '@/lib/format/figures'
import { say, strong, type TextPart } from '@/lib/format/sentence'
import { formatMoment } from '@/lib/format/times'
import type { Sensor, SensorCredential, SensorStateWord } from './sensor'

export const sensorStateWords: Readonly<Record<SensorStateWord, string>> = {
  alive: 'alive',
  late: 'late',
  silent: 'silent',
  'never-heard': 'never heard',
  retired: 'retired',
}

export const coinCellCaution =
  'Many sensors run on a coin cell. Keep coin cells, new and spent, away from children: a swallowed one is an ' +
  'emergency, so call for help at once. Guidance: CPSC, Button Cell and Coin Battery Safety; local health services.'

type Headlined = Pick<Sensor, 'name' | 'state'>

/** The sentence over the list: what needs someone first. */
export function sensorsHeadline(sensors: readonly Headlined[]): TextPart[] {
  const inUse = sensors.filter((sensor) => sensor.state !== 'retired')
  if (inUse.length === 0)
    return say`No sensor hangs here yet. ${strong('Add one')}, and its room keeps watch by itself.`
  const silent = inUse.filter((sensor) => sensor.state === 'silent')
  const unheard = inUse.filter((sensor) => sensor.state === 'never-heard')
  const heard = inUse.length - silent.length - unheard.length
  const rest =
    heard === 0
      ? ''
      : heard === 1
        ? ' The other one is heard from.'
        : ` The other ${String(heard)} are heard from.`
  if (silent.length > 0) {
    const verb = silent.length === 1 ? 'is' : 'are'
    return say`${strong(listed(silent))} ${verb} silent: look at the battery and the way to it.${rest}`
  }
  if (unheard.length > 0) {
    return say`${strong(listed(unheard))} ${unheard.length === 1 ? 'has' : 'have'} never been heard.${rest}`
  }
  return heard === 1
    ? say`The one sensor is heard from.`
    : say`All ${formatCount(heard, 'sensor')} are heard from.`
}

function listed(sensors: readonly Headlined[]): string {
  const names = sensors.map((sensor) => sensor.name)
  if (names.length <= 2) return names.join(' and ')
  return `${names.slice(0, 2).join(', ')} and ${String(names.length - 2)} more`
}

/**
 * A line for a terminal that sends one reading as the sensor would.
 * @param secret the secret itself, or undefined when it can't be shown any more
 */
export function publishLine(credential: Omit<SensorCredential, 'secret'>, secret?: string): string {
  return [
    'mosquitto_pub',
    `-h ${credential.broker.host}`,
    `-p ${String(credential.broker.port)}`,
    '-q 1',
    `-u '${credential.signInName}'`,
    `-P '${secret ?? 'the secret'}'`,
    `-t '${credential.topic}'`,
    `-m '{"temperatureC":20.4,"humidityPct":53}'`,
  ].join(' ')
}

/** Kinds of what was not simply stored, in the order in which they matter. */
export const countWords: Readonly<Record<string, string>> = {
  refused: 'could not be used',
  conflict: 'disagreed with one already kept',
  late: 'came late and were counted for their own hour',
  duplicate: 'came twice and were counted once',
}

type Sentenced = Pick<Sensor, 'name' | 'state' | 'room' | 'last' | 'heardAt' | 'clock'>

/** The sentence over one sensor's page. */
export function sensorSentence(sensor: Sentenced, timeZone: string, now: Date): TextPart[] {
  const name = strong(sensor.name)
  const where = sensor.room ? ` in ${sensor.room.name}` : ''
  if (sensor.state === 'retired') return say`${name} is retired; its readings are kept.`
  if (sensor.state === 'never-heard')
    return say`${name}${where} has never been heard. Put its secret in, and it starts.`
  const since = sensor.heardAt ? say` since ${strong(formatMoment(sensor.heardAt, timeZone, now))}` : ''
  if (sensor.state === 'silent')
    return say`${name}${where} has been silent${since}: look at its battery and the way to it.`
  if (sensor.state === 'late') return say`${name}${where} is later than usual; not heard${since}.`
  if (sensor.clock !== 'right')
    return say`${name}${where} is heard from, but ${strong('its clock is wrong')}: set it.`
  const says = sensor.last ? say` and says ${strong(formatEmc(sensor.last.emcPct))}` : ''
  return say`${name}${where} is alive${says}.`
}
