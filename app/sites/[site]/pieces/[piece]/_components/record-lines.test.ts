import { describe, expect, it } from 'vitest'
import type { PieceEventView } from '@/lib/pieces/event'
import type { Outcome } from '@/lib/pieces/outcome'
import { recordLines } from './record-lines'

const event = (more: Partial<PieceEventView>): PieceEventView => ({
  ...{ id: 'e1', kind: 'note', at: '2026-03-05T10:00:00.000Z', room: null, data: {}, note: '' },
  ...{ by: 'The maker', isUndone: false },
  ...more,
})
const outcome = (more: Partial<Outcome>): Outcome => ({
  ...{ id: 'o1', at: '2026-03-05T11:00:00.000Z', turned: 'binds', carryId: null, note: '' },
  ...{ by: null, isUndone: false },
  ...more,
})

describe('the lines of a piece’s record', () => {
  it('stand newest first, events and turns of the lid together', () => {
    const lines = recordLines(
      [event({ id: 'e1' }), event({ id: 'e2', at: '2026-03-05T12:00:00.000Z' })],
      [outcome({})],
      'metric',
    )
    expect(lines.map(({ id }) => id)).toEqual(['e2', 'o1', 'e1'])
  })

  it('tell a note by its words, and a turn by how it went and whether a carry came before', () => {
    const [turn, note] = recordLines(
      [event({ note: 'a hair crack' })],
      [outcome({ turned: 'tighter', carryId: 'c1' })],
      'metric',
    )
    expect(note).toMatchObject({ title: 'a hair crack', more: '', isNote: true })
    expect(turn).toMatchObject({ title: 'Its lid was tighter a quarter turn on', where: 'after a carry' })
  })

  it('tell of a fit where it was made and what its wood was, the note behind', () => {
    const [line] = recordLines(
      [
        event({
          kind: 're-true',
          room: { id: 'r1', name: 'Shop', mark: 1 },
          data: { fitGrade: 'snug', ringMcPct: 9, lidMcPct: 9, doubtPct: 0.5, basis: 'followed' },
          note: 'skimmed',
        }),
      ],
      [],
      'metric',
    )
    expect(line).toMatchObject({ title: 'Re-true, a snug lid', where: 'Shop', isNote: false })
    expect(line?.more).toMatch(/^Its wood stood at about 9\.0.* skimmed$/)
  })
})
