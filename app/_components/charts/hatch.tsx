type HatchProps = {
  id: string
  colour?: string
  /** Distance between lines, px. */ gap?: number
  width?: number
}

/** Doubt and what is unfit are hatched, so that they read without colour. */
export function Hatch({ id, colour = 'var(--ink-soft)', gap = 6, width = 1.5 }: HatchProps) {
  return (
    <pattern id={id} width={gap} height={gap} patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
      <line x1={gap / 2} y1="0" x2={gap / 2} y2={gap} stroke={colour} strokeWidth={width} />
    </pattern>
  )
}
