import { describe, expect, it } from 'vitest'
import type { Room } from './room'
import { roomsHeadline } from './rooms-headline'

function room(name: string, emcPct: number | null, kind: 'fresh' | 'stale' = 'fresh'): Room {
  return {
    id: name,
    name,
    kind: 'house',
    mark: 0,
    isShared: false,
    keepsDryWork: false,
    note: '',
    version: 1,
    year: null,
    sensors: 1,
    pieces: 0,
    air:
      emcPct === null
        ? { kind: 'never' }
        : {
            kind,
            at: '2026-03-05T13:00:00Z',
            ageS: 60,
            temperatureC: 20,
            humidityPct: 45,
            emcPct,
            emcDoubtPct: 0.6,
            dewPointC: 8,
            isTyped: false,
            flags: [],
          },
  }
}

const told = (rooms: Room[]) =>
  roomsHeadline(rooms)
    .map((part) => part.text)
    .join('')
    .replaceAll('\u00a0', ' ')

describe('the sentence at the top of Rooms', () => {
  it('sets the driest against the dampest', () => {
    expect(told([room('Shop', 13.6), room('Cupboard', 8.5), room('Study', 9)])).toBe(
      'Shop is 5.1 points of % MC damper than Cupboard: wood carried from one to the other moves.',
    )
  })

  it('calls less than sensors can tell no difference', () => {
    expect(told([room('Study', 8.9), room('Cupboard', 8.5)])).toContain('no telling difference')
  })

  it('says first what can not be known, and never judges on an old reading', () => {
    const words = told([room('Timber store', 16.1, 'stale'), room('Cupboard', 8.5)])
    expect(words).toBe('Timber store has no fresh reading. Cupboard brings wood to about 8.5 % MC.')
  })

  it('has words for no room and for no reading', () => {
    expect(told([])).toBe('No room is known here yet.')
    expect(told([room('Van', null)])).toContain('No room has been read yet')
  })
})
