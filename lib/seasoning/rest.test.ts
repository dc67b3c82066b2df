import { describe, expect, it } from 'vitest'
import { dayMs } from './policy'
import { restOf, type RestQuestion } from './rest'
import { restViewSchema } from './rest-view'
import { weighNextWords } from './rest-words'
import type { WoodCourse } from './wood-course'

const now = Date.parse('2026-05-20T10:00:00Z')
const ago = (days: number): number => now - days * dayMs
const steady: WoodCourse = {
  at: [ago(200), now],
  mcPct: [9, 9],
  mcAt: () => 9,
  driftAt: () => 0,
}
const level = [100, 70, 40, 5].map((days) => ({ at: ago(days), grams: 436, stepG: null }))
const question = (more: Partial<RestQuestion> = {}): RestQuestion => ({
  ...{ now, timeZone: 'Europe/London', units: 'metric', stage: 'roughed' },
  weighings: level,
  events: [{ kind: 'oven-dry', at: ago(101), ovenDryG: 400 }],
  scaleStepG: 1,
  roughedAt: ago(120),
  readyByWeight: false,
  createdAt: ago(120),
  followed: { pct: 9.2, doubtPct: 0.7 },
  target: { pct: 9, room: 'Study', days: 365 },
  courseThrough: () => steady,
  ...more,
})
const codes = (more: Partial<RestQuestion>) => restOf(question(more)).missing.map(({ code }) => code)

describe('where a resting piece stands', () => {
  it('is ready with all that is asked for, and reads as the API tells it', () => {
    const rest = restOf(question())
    expect(rest).toMatchObject({ state: 'ready', missing: [], mc: { from: 'oven-dry' } })
    expect(rest.mc?.pct).toBeCloseTo(9, 9)
    expect(restViewSchema.parse(rest)).toEqual(rest)
    expect(rest.met).toEqual([
      'It has weighed the same for eight weeks.',
      'Its MC is within 0.7 points of the middle of its keep room’s year.',
      '60 days since roughing: passed on 21 March.',
    ])
  })

  it('has no target where its keep room’s record is too short for a year’s middle', () => {
    expect(codes({ target: { pct: 9, room: 'Study', days: 59 } })).toEqual(['target-unknown'])
    expect(codes({ target: undefined })).toEqual(['target-unknown'])
  })

  it('goes by its weight or by the model, whichever is known the better', () => {
    const meter = { events: [{ kind: 'meter', at: ago(5), mcPct: 9.5 }] }
    expect(restOf(question(meter)).mc).toMatchObject({ from: 'model', pct: 9.2 })
    const unsure = { ...meter, followed: { pct: 12, doubtPct: 1.5 } }
    expect(restOf(question(unsure)).mc).toMatchObject({ from: 'meter', pct: expect.closeTo(9.5, 6) })
    expect(restOf(question({ events: [], followed: undefined })).mc).toBeNull()
  })

  it('forgets weights and the oven-dry mass at a cut, but not when it was roughed', () => {
    const cut = { events: [...question().events, { kind: 'cut', at: ago(20) }] }
    const rest = restOf(question(cut))
    expect(rest.series).toMatchObject({ openedBy: { kind: 'cut' }, weights: 1, earlierWeights: 3 })
    expect(rest.dryMass?.from).toBe('model')
    expect(rest.missing.map(({ code }) => code)).toEqual(['too-few-weights'])
    expect(codes({ events: [...cut.events, { kind: 'roughed', at: ago(30) }] })).toContain(
      'rest-after-roughing',
    )
    expect(codes({ events: [...cut.events, { kind: 'near-final', at: ago(3) }] })).toContain(
      'rest-after-near-final',
    )
    expect(codes({ events: [...question().events, { kind: 'cut', at: now + dayMs }] })).toEqual([])
  })

  it('takes the coarser of two scales', () => {
    const two = [...level.slice(0, 3), { at: ago(5), grams: 436, stepG: 5 }]
    expect(restOf(question({ weighings: two }))).toMatchObject({ stepG: 5, isStepAssumed: false })
    expect(restOf(question({ scaleStepG: null }))).toMatchObject({ stepG: 1, isStepAssumed: true })
  })

  it('says that a whole blank has not been roughed out', () => {
    const [missing] = restOf(question({ stage: 'blank', roughedAt: undefined })).missing
    expect(missing?.words).toMatch(/^It has not been roughed out/)
    expect(restOf(question({ roughedAt: undefined })).words).toBe(
      'Not ready: when it was roughed out is not known.',
    )
  })

  it('tells the range only where time alone brings what is missing', () => {
    const early = { roughedAt: ago(20) }
    expect(restOf(question(early)).words).toBe(
      'Leave it resting: it may be ready between 29 June and 6 July.',
    )
    expect(restOf(question({ ...early, target: undefined })).words).toMatch(
      /^Not ready: there is no year of air/,
    )
  })
})

describe('the next weighing', () => {
  const clock = { now, timeZone: 'Europe/London' }

  it('is told by its day, as due, or as the first', () => {
    expect(weighNextWords({ dueAt: now + 25 * dayMs, isDue: false }, true, clock)).toBe(
      'Weigh it again on 14 June.',
    )
    expect(weighNextWords({ dueAt: now, isDue: true }, true, clock)).toBe('It is due to be weighed.')
    expect(weighNextWords({ dueAt: now, isDue: true }, false, clock)).toBe(
      'Weigh it now, and then once a month.',
    )
  })
})
