import { describe, expect, it } from 'vitest'
import type { NowView } from '@/lib/now/now-view'
import { furthestApart, nowRule, roomFlag } from './now-rule'

const clock = { timeZone: 'Europe/London', now: new Date('2026-03-05T13:10:00Z') }
const plain = (text: string) => text.replaceAll('\u00a0', ' ')

type Room = NowView['rule']['rooms'][number]

function room(
  name: string,
  emcPct: number,
  more: Partial<Room> = {},
  kind: 'fresh' | 'stale' = 'fresh',
): Room {
  return {
    id: name,
    name,
    kind: 'house',
    mark: 0,
    isFocus: false,
    year: null,
    air: {
      kind,
      at: '2026-03-05T03:40:00Z',
      ageS: 60,
      temperatureC: 20,
      humidityPct: 45,
      emcPct,
      emcDoubtPct: 0.8,
      dewPointC: 8,
      isTyped: false,
      flags: [],
    },
    ...more,
  }
}

function view(more: Partial<NowView['rule']>, carries: Partial<NowView> = {}): NowView {
  return {
    at: clock.now.toISOString(),
    headline: [],
    out: [],
    planned: [],
    rule: { rooms: [], brackets: [], shelf: [], ...more },
    strip: null,
    isLockUp: false,
    justBack: [],
    needs: [],
    silent: [],
    counts: { rooms: 0, sensors: 0, pieces: 0 },
    completeTo: null,
    age: null,
    ...carries,
  }
}

const bracket = {
  id: 'p207',
  number: '207',
  cutMcPct: 8.9,
  mcPct: 9.9,
  lowMcPct: 6.9,
  highMcPct: 10.9,
  isOut: true,
  earlyAt: '2026-03-05T13:35:00Z',
  leftPct: 1,
}

describe("Now's moisture rule", () => {
  it('never shows an old value as now', () => {
    const flag = roomFlag(room('Timber store', 16.1, {}, 'stale'), clock)
    expect(plain(flag?.value ?? '')).toBe('16.1 % MC at 03:40')
    expect(flag?.tone).toBe('soft')
    expect(flag?.doubtPct).toBe(0.8)
  })

  it('hangs no flag for a room that was never read', () => {
    expect(nowRule(view({ rooms: [room('Van', 9, { air: { kind: 'never' } })] }), clock).flags).toEqual([])
  })

  it('says by when a piece that is out must be back, and what is left', () => {
    const [only] = nowRule(view({ brackets: [bracket] }), clock).brackets
    expect(plain(only?.label ?? '')).toBe('207, out: 1.0 point left, back by 13:35')
    expect(only?.leftToPct).toBe(10.9)
  })

  it('says that the time is past once it is', () => {
    const [only] = nowRule(
      view({ brackets: [{ ...bracket, earlyAt: '2026-03-05T12:00:00Z' }] }),
      clock,
    ).brackets
    expect(only?.label).toContain('was due 12:00')
  })

  it('sets the keep room against the room furthest from it', () => {
    const apart = furthestApart([
      room('Cupboard', 8.5, { isFocus: true }),
      room('Study', 8.8),
      room('Shop', 13.6),
    ])
    expect(apart?.far.name).toBe('Shop')
    expect(furthestApart([room('Cupboard', 8.5)])).toBeNull()
  })
})
