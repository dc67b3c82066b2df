import { describe, expect, it } from 'vitest'
import type { NoticeRoom } from '../surroundings'
import { oncePerRecord } from './room-rule'

const room = (): NoticeRoom => ({
  code: 'cupboard42',
  name: 'Landing cupboard',
  kind: 'cupboard',
  keepsDryWork: false,
  isKeepRoom: true,
  hasRestingWood: false,
  days: [],
  hours: [],
})

describe('what is made of a record of whole days', () => {
  function counting() {
    const lately = oncePerRecord<number>()
    let made = 0
    const look = (of: NoticeRoom, values: object, beside?: unknown) =>
      lately(of, values, () => (made += 1), beside)
    return look
  }

  it('is made once while record and words are the same', () => {
    const look = counting()
    const one = room()
    expect([look(one, { days: 2 }), look({ ...one, name: 'Renamed' }, { days: 2 })]).toEqual([1, 1])
  })

  it.each([
    ['the days are loaded anew', (look: ReturnType<typeof counting>) => look(room(), { days: 2 })],
    [
      'a word of the rule changes',
      (look: ReturnType<typeof counting>, one: NoticeRoom) => look(one, { days: 3 }),
    ],
    [
      'the days outdoors do',
      (look: ReturnType<typeof counting>, one: NoticeRoom) => look(one, { days: 2 }, []),
    ],
  ])('is made anew when %s', (_when, again) => {
    const look = counting()
    const one = room()
    look(one, { days: 2 })
    expect(again(look, one)).toBe(2)
  })
})
