import { describe, expect, it } from 'vitest'
import { isUsableClientId, parseSignInName, parseTopic, signInNameOf, topicOf } from './topic'

const site = '23456789ab'
const sensor = 'cdefghjkmn'

describe('topics', () => {
  it('come back from what they were made of', () => {
    expect(parseTopic(topicOf(site, sensor, 'reading'))).toEqual({
      siteCode: site,
      sensorCode: sensor,
      kind: 'reading',
    })
    expect(parseSignInName(signInNameOf(site, sensor))).toEqual({ siteCode: site, sensorCode: sensor })
  })

  it.each([
    '',
    `lidfast/v1/${site}/${sensor}`,
    `lidfast/v1/${site}/${sensor}/readings`,
    `lidfast/v1/${site}/${sensor}/reading/`,
    `lidfast/v1/${site}/${sensor}/reading\n`,
    `lidfast/v1/+/${sensor}/reading`,
    `lidfast/v1/${site}/#`,
    `$SYS/${site}/${sensor}/reading`,
    `x/lidfast/v1/${site}/${sensor}/reading`,
  ])('that are not ours are none: %j', (topic) => {
    expect(parseTopic(topic)).toBeUndefined()
  })

  it.each(['', site, `${site}/`, `${site}/${sensor}/x`, `${site}/#`, `${site}/+`, `${site}\u0000/${sensor}`])(
    'a sign-in name %j is none',
    (name) => {
      expect(parseSignInName(name)).toBeUndefined()
    },
  )
})

describe('client ids', () => {
  it.each(['mosq-4Fj2', 'esp32_0a:1b', 'x'.repeat(128)])('%s signs in', (id) => {
    expect(isUsableClientId(id)).toBe(true)
  })

  it.each(['', 'a+b', 'a#b', '$SYS', 'a b', 'a\u0000b', 'x'.repeat(129), '😀', 'a\u202eb'])(
    '%j does not',
    (id) => {
      expect(isUsableClientId(id)).toBe(false)
    },
  )
})
