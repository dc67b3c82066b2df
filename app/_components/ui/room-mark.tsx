type RoomMarkShapeProps = { mark: number; /** Half the width, px. */ r?: number; ground?: string }

/**
 * The sign of a room, the same on every page: filled square, open circle, triangle, diamond, cross, open square,
 * then dashes for the seventh and any later room. Drawn round the origin, for use inside a figure.
 */
export function RoomMarkShape({
  mark,
  r = 5,
  ground = 'var(--figure-ground, var(--board))',
}: RoomMarkShapeProps) {
  const line = { fill: 'none', stroke: 'currentColor', strokeWidth: 1.75 }
  switch (mark) {
    case 0:
      return <rect x={-r} y={-r} width={2 * r} height={2 * r} fill="currentColor" />
    case 1:
      return <circle r={r} {...line} fill={ground} />
    case 2:
      return <path d={`M0 ${-r}L${r * 1.1} ${r}H${-r * 1.1}z`} fill="currentColor" />
    case 3:
      return <path d={`M0 ${-r * 1.3}L${r * 1.3} 0L0 ${r * 1.3}L${-r * 1.3} 0z`} fill="currentColor" />
    case 4:
      return <path d={`M${-r} ${-r}L${r} ${r}M${r} ${-r}L${-r} ${r}`} {...line} strokeWidth={2.25} />
    case 5:
      return <rect x={-r} y={-r} width={2 * r} height={2 * r} {...line} fill={ground} />
    default:
      return <path d={`M${-r} ${-r * 0.5}H${r}M${-r} ${r * 0.5}H${r}`} {...line} strokeDasharray="4 2" />
  }
}

/** A room's sign within text, always beside its name. */
export function RoomMark({ mark, size = 14 }: { mark: number; size?: number }) {
  return (
    <svg
      aria-hidden="true"
      width={size}
      height={size}
      viewBox="-8 -8 16 16"
      className="inline-block shrink-0 self-center"
    >
      <RoomMarkShape mark={mark} />
    </svg>
  )
}
