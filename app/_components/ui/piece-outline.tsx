export type Outline = 'low' | 'tall' | 'round' | 'pair'

type PieceOutlineShapeProps = { outline: Outline; /** Out pieces stand on wash. */ isOut?: boolean }

/**
 * A piece drawn as what it is: a low box, a tall one, a round one with a finial, or a taped pair of a blank.
 * Drawn 40 wide and 48 high, standing on y = 48, for use inside a figure.
 */
export function PieceOutlineShape({ outline, isOut = false }: PieceOutlineShapeProps) {
  const fill = isOut ? 'var(--wash)' : 'var(--board)'
  const body = { fill, stroke: 'currentColor', strokeWidth: 1.5, strokeLinejoin: 'round' as const }
  switch (outline) {
    case 'low':
      return (
        <>
          <path d="M16 14 15 9h10l-1 5z" {...body} />
          <path d="M1 27C1 17 9 14 20 14s19 3 19 13z" {...body} />
          <path d="M1 27h38l-5 20H6z" {...body} />
        </>
      )
    case 'tall':
      return (
        <>
          <circle cx="20" cy="6" r="3.4" {...body} />
          <path d="M6 21C6 12 13 9.4 20 9.4S34 12 34 21z" {...body} />
          <path d="M8 21h24v26H8z" {...body} />
        </>
      )
    case 'round':
      return (
        <>
          <path d="M20 0c.6 7 1.2 10 3 13h-6c1.8-3 2.4-6 3-13z" {...body} />
          <path d="M1.5 29C1.5 18 10 13 20 13s18.5 5 18.5 16z" {...body} />
          <path d="M1.5 29h37c0 9-5 14-12 18h-13c-7-4-12-9-12-18z" {...body} />
        </>
      )
    case 'pair':
      return (
        <>
          <path d="M12 7h16v5H12zM12 42h16v5H12z" {...body} />
          <path d="M5 12h30v30H5z" {...body} />
          <path d="M3.5 22h33v10h-33z" {...body} fill="var(--steel)" strokeWidth={1.25} />
        </>
      )
  }
}

export function PieceOutline({
  outline,
  isOut = false,
  size = 44,
}: PieceOutlineShapeProps & { size?: number }) {
  return (
    <svg
      aria-hidden="true"
      width={(size * 42) / 50}
      height={size}
      viewBox="-1 -1 42 50"
      className="inline-block shrink-0"
    >
      <PieceOutlineShape outline={outline} isOut={isOut} />
    </svg>
  )
}
