/** How a formula or a figure was come by. */
export type MethodStatus =
  'read' | 'confirmed' | 'derived' | 'from memory' | 'common practice, no source' | 'guess' | 'second hand'

/** What each status promises, in the order of trust. */
export const STATUS_WORDS: readonly { readonly status: MethodStatus; readonly words: string }[] = [
  {
    status: 'confirmed',
    words: 'Read or recalled, and then found again by running it against values printed elsewhere.',
  },
  { status: 'read', words: 'Seen in the publication that is named.' },
  { status: 'derived', words: 'Worked out for this program from what is named; it stands in no book.' },
  { status: 'second hand', words: 'Seen where somebody quotes it; the original was not.' },
  { status: 'from memory', words: 'Recalled and not seen. It may be a little out.' },
  {
    status: 'common practice, no source',
    words: 'What makers do, as far as anybody remembers. Nobody measured it.',
  },
  { status: 'guess', words: 'Somebody had to put a figure there. It is to be learned from use.' },
]
