import type { Episode, NewNotice, NoticeInputs, NoticeSensor, RulePart } from '../inputs'
import { recipients, makers } from '../people'
import { isRuleOn } from '../rule-settings'
import { silentBody, silentTitle } from '../wording'

/** From when a sensor counts as silent; null where it was never heard. */
export function silentSince({
  lastHeardAt,
  silentFrom,
  freshUntil,
  piecesOutThere,
}: NoticeSensor): number | null {
  if (lastHeardAt === null || silentFrom === null) return null
  // A piece out there is judged by this sensor: then the end of its freshness counts, not the usual patience.
  const isWatched = piecesOutThere.length > 0 && freshUntil !== null
  return isWatched ? Math.min(freshUntil, silentFrom) : silentFrom
}

/** A sensor that has gone silent: told once for one silence, at once when a piece is out in its room. */
export function silent(now: number, inputs: NoticeInputs): RulePart {
  if (!isRuleOn(inputs.rules, 'sensor-silent')) return { episodes: [], notices: [] }
  const parts = inputs.sensors.map((sensor): RulePart => {
    const from = silentSince(sensor)
    if (from === null || sensor.lastHeardAt === null || now < from) return { episodes: [], notices: [] }
    const isWatched = sensor.piecesOutThere.length > 0 && sensor.freshUntil !== null
    const at = new Date(now)
    const episode: Episode = {
      rule: 'sensor-silent',
      subject: `sensor ${sensor.code}`,
      key: new Date(sensor.lastHeardAt).toISOString(),
      state: 'telling',
      beganAt: from,
    }
    const notice: NewNotice = {
      key: `sensor-silent/${sensor.code}/${episode.key}`,
      rule: 'sensor-silent',
      urgency: isWatched ? 'now' : 'whenever',
      mark: 'silent',
      title: silentTitle(sensor, inputs.site.timeZone, at),
      body: silentBody(sensor),
      link: `/sensors/${sensor.code}`,
      episode,
      sensorCode: sensor.code,
      to: recipients(makers(inputs.people)),
    }
    return { episodes: [episode], notices: [notice] }
  })
  return { episodes: parts.flatMap((part) => part.episodes), notices: parts.flatMap((part) => part.notices) }
}
