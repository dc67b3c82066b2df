import type { Episode, NewNotice, NoticeInputs, RulePart } from '../inputs'
import { recipients, makers } from '../people'
import { silentBody, silentTitle } from '../wording'

/** A sensor that has gone silent: told once for one silence, at once when a piece is out in its room. */
export function silent(now: number, inputs: NoticeInputs): RulePart {
  const parts = inputs.sensors.map((sensor): RulePart => {
    const { lastHeardAt, silentFrom, freshUntil, piecesOutThere } = sensor
    if (lastHeardAt === null || silentFrom === null) return { episodes: [], notices: [] }
    // A piece out there is judged by this sensor: then the end of its freshness counts, not the usual patience.
    const isWatched = piecesOutThere.length > 0 && freshUntil !== null
    const from = isWatched ? Math.min(freshUntil, silentFrom) : silentFrom
    if (now < from) return { episodes: [], notices: [] }
    const at = new Date(now)
    const episode: Episode = {
      rule: 'sensor-silent',
      subject: `sensor ${sensor.code}`,
      key: new Date(lastHeardAt).toISOString(),
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
