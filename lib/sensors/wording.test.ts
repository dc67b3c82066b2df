import { describe, expect, it } from 'vitest'
import { formatEmc } from '@/lib/format/figures'
import { plainText, strongTexts } from '@/lib/format/sentence'
import { publishLine, sensorSentence, sensorsHeadline as headlineParts } from './wording'

const sensorsHeadline = (...of: Parameters<typeof headlineParts>) => plainText(headlineParts(...of))

describe('the sentence over the sensors', () => {
  it('asks for the first one when there is none', () => {
    expect(sensorsHeadline([])).toContain('No sensor hangs here yet')
    expect(sensorsHeadline([{ name: 'Old', state: 'retired' }])).toContain('No sensor hangs here yet')
  })

  it('names the silent one before anything else, and counts the others', () => {
    const headline = sensorsHeadline([
      { name: 'Kitchen', state: 'alive' },
      { name: 'New', state: 'never-heard' },
      { name: 'Timber store', state: 'silent' },
    ])
    expect(headline).toMatch(/^Timber store is silent/)
    expect(headline).toContain('The other one is heard from.')
  })

  it('counts a late one as heard', () => {
    expect(
      sensorsHeadline([
        { name: 'A', state: 'late' },
        { name: 'B', state: 'alive' },
      ]),
    ).toBe('All 2 sensors are heard from.')
  })

  it('never lists more than two names', () => {
    const headline = sensorsHeadline(['A', 'B', 'C', 'D'].map((name) => ({ name, state: 'silent' as const })))
    expect(headline).toMatch(/^A, B and 2 more are silent/)
    expect(headline).not.toContain('The other')
  })
})

describe('the line for a terminal', () => {
  const credential = {
    signInName: 'aaaaaaaaaa/bbbbbbbbbb',
    topic: 'lidfast/v1/aaaaaaaaaa/bbbbbbbbbb/reading',
    broker: { host: '127.0.0.1', port: 18830 },
  }

  it('publishes with an acknowledgement, as the sensor, under its own topic', () => {
    expect(publishLine(credential, 's3cret')).toBe(
      `mosquitto_pub -h 127.0.0.1 -p 18830 -q 1 -u 'aaaaaaaaaa/bbbbbbbbbb' -P 's3cret' ` +
        `-t 'lidfast/v1/aaaaaaaaaa/bbbbbbbbbb/reading' -m '{"temperatureC":20.4,"humidityPct":53}'`,
    )
  })

  it('leaves a gap where the secret is no longer known', () => {
    expect(publishLine(credential)).toContain("-P 'the secret'")
  })
})

describe('the sentence over one sensor', () => {
  const sensor = {
    name: 'Pantry shelf',
    state: 'alive',
    room: { id: 'x', name: 'Kitchen', mark: 2 },
    last: { at: '2026-03-05T13:05:00Z', temperatureC: 20.4, humidityPct: 53, emcPct: 9.76 },
    heardAt: '2026-03-05T13:05:01Z',
    clock: 'right',
  } as const
  const now = new Date('2026-03-05T13:10:00Z')

  it('says what a living one says', () => {
    expect(strongTexts(sensorSentence(sensor, 'UTC', now))).toEqual(['Pantry shelf', formatEmc(9.76)])
  })
  it('never says that a silent one is alive, and tells since when', () => {
    const words = plainText(sensorSentence({ ...sensor, state: 'silent' }, 'UTC', now))
    expect(words).toContain('has been silent since 13:05')
    expect(words).not.toContain('alive')
  })
  it('puts a wrong clock before its reading', () => {
    expect(plainText(sensorSentence({ ...sensor, clock: 'ahead' }, 'UTC', now))).toContain(
      'its clock is wrong',
    )
  })
})
