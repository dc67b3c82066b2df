import { describe, expect, it } from 'vitest'
import { afterFit, type FitEntry, type FitFacts, fitOfEntries, isLatestFit } from './fit-record'

const told: FitFacts = {
  stage: 'roughed',
  fittedAt: null,
  fittedOn: null,
  fittedRoomId: null,
  fitMcPct: null,
  fitLidMcPct: null,
  fitGrade: 'snug',
  clearanceMm: null,
  allowanceMm: 0.07,
  jointDiameterMm: 60,
}

const entry = (id: number, day: number, data: FitEntry['data'], more: Partial<FitEntry> = {}): FitEntry => ({
  id,
  at: `2026-02-0${String(day)}T10:00:00.000Z`,
  on: `2026-02-0${String(day)}`,
  roomId: 3,
  data,
  before: told,
  isUndone: false,
  ...more,
})

const followed = { ringMcPct: 9.1, lidMcPct: 8.8, doubtPct: 0.6, basis: 'followed' } as const

describe('the record after a fit', () => {
  it('counts from the wood of ring and lid there, and drops an allowance told for the fit before', () => {
    expect(afterFit(told, entry(1, 1, { ...followed, fitGrade: 'easy' }))).toEqual({
      ...{ stage: 'box', fittedAt: '2026-02-01T10:00:00.000Z', fittedOn: '2026-02-01', fittedRoomId: 3 },
      ...{ fitMcPct: 9.1, fitLidMcPct: 8.8, fitGrade: 'easy', clearanceMm: null, allowanceMm: null },
      jointDiameterMm: 60,
    })
  })

  it('keeps how the lid fits where that was not judged anew', () => {
    const after = afterFit(told, entry(1, 1, { ...followed, fitGrade: null, clearanceMm: null }))
    expect(after).toMatchObject({ fitGrade: 'snug', allowanceMm: 0.07 })
  })

  it('does not take a month’s mean for wood that was followed', () => {
    const month = { ringMcPct: 9, lidMcPct: 9, doubtPct: 1.5, basis: 'month-mean' } as const
    expect(afterFit(told, entry(1, 1, month))).toMatchObject({ fitMcPct: null, fitLidMcPct: null })
  })
})

describe('the fits that stand', () => {
  const first = entry(1, 2, { ...followed, fitGrade: 'easy' })
  const second = entry(2, 4, { ...followed, fitGrade: 'loose', jointDiameterMm: 59 })

  it('make the record in the order in which they were made, not entered', () => {
    const late = entry(3, 1, { ...followed, clearanceMm: 0.3 })
    expect(fitOfEntries([first, second, late])).toMatchObject({ fitGrade: 'loose', jointDiameterMm: 59 })
    expect(isLatestFit(late, [first, second, late])).toBe(false)
    expect(isLatestFit(second, [first, second, late])).toBe(true)
  })

  it('leave the one before when the last is undone, and the record as it was when all are', () => {
    const gone = { ...second, isUndone: true }
    expect(fitOfEntries([first, gone])).toMatchObject({ fitGrade: 'easy', jointDiameterMm: 60 })
    expect(isLatestFit(first, [first, gone])).toBe(true)
    expect(fitOfEntries([{ ...first, isUndone: true }, gone])).toEqual(told)
  })

  it('say nothing where no fit was ever entered', () => {
    expect(fitOfEntries([])).toBeUndefined()
  })
})
