'use client'

import { type PointerEvent, useId, useRef } from 'react'
import type { LidShape, LidTurned } from '@/lib/fit/lid-view'
import { Hatch } from './hatch'
import {
  angleOfPoint,
  FRAME,
  handleAt,
  HANDLE_RADIUS,
  outlinePath,
  pointAt,
  PROTRACTOR,
  PROTRACTOR_RADIUS,
  RECESS_RADIUS,
  ringPaths,
  WALL,
} from './lid-drawing-model'
import { drawnShare } from '@/lib/fit/lid-outline'

type LidDrawingProps = {
  shape: LidShape
  turned: LidTurned
  /** The figure in one sentence. */
  name: string
  onTurn: (angleDeg: number) => void
}

/** The joint from the end: the lid's wall hatched, its recess in ink, the spigot in heart with rings that turn. */
export function LidDrawing({ shape, turned, name, onTurn }: LidDrawingProps) {
  const ids = useId()
  const svg = useRef<SVGSVGElement>(null)
  const { spigotOutline, socketOutline, radiusMm, exaggeration } = shape
  const recess = outlinePath(socketOutline, radiusMm, exaggeration, 0)
  const wall = outlinePath(socketOutline, radiusMm, exaggeration, 0, WALL)
  const spigot = outlinePath(spigotOutline, radiusMm, exaggeration, turned.angleDeg)
  const follow = (event: PointerEvent<SVGGElement>) => {
    const matrix = svg.current?.getScreenCTM()
    if (matrix)
      onTurn(angleOfPoint(new DOMPoint(event.clientX, event.clientY).matrixTransform(matrix.inverse())))
  }
  const isClose = turned.feel === 'binds' || turned.feel === 'tight'

  return (
    <svg
      ref={svg}
      viewBox={`0 0 ${String(FRAME.width)} ${String(FRAME.height)}`}
      className="mx-auto block w-full max-w-[27rem] select-none print:max-w-[18rem]"
      fontSize="14"
    >
      <title>{name}</title>
      <defs>
        <Hatch id={`${ids}-wall`} gap={6} width={1} />
        <Hatch id={`${ids}-binds`} colour="var(--warn)" gap={5} width={1.5} />
        <clipPath id={`${ids}-spigot`}>
          <path d={spigot} />
        </clipPath>
      </defs>
      <g aria-hidden="true">
        <path d={`${wall}${recess}`} fillRule="evenodd" fill={`url(#${ids}-wall)`} />
        <path d={recess} fill="var(--board)" />
        <path d={spigot} fill="var(--wash)" />
        <g clipPath={`url(#${ids}-spigot)`}>
          <g
            transform={`rotate(${String(turned.angleDeg)} ${String(FRAME.x)} ${String(FRAME.y)})`}
            fill="none"
            stroke="var(--heart)"
            opacity="0.55"
          >
            {ringPaths().map((ring) => (
              <path key={ring} d={ring} />
            ))}
          </g>
          <path
            d={`M0 0H${String(FRAME.width)}V${String(FRAME.height)}H0Z${recess}`}
            fillRule="evenodd"
            fill={`url(#${ids}-binds)`}
          />
        </g>
        <path d={recess} fill="none" stroke="var(--ink)" strokeWidth="1.5" />
        <path d={spigot} fill="none" stroke="var(--heart)" strokeWidth="3" />
        {turned.contacts.map(({ directionDeg }) => (
          <Closest key={directionDeg} directionDeg={directionDeg} isClose={isClose} shape={shape} />
        ))}
        <Protractor />
        <Words turned={turned} />
      </g>
      <Handle angleDeg={turned.angleDeg} follow={follow} />
    </svg>
  )
}

/** Where the two are closest: a warn dot and a stroke inwards when they all but touch, else an open ring. */
function Closest({
  directionDeg,
  isClose,
  shape,
}: {
  directionDeg: number
  isClose: boolean
  shape: LidShape
}) {
  const share = drawnShare(shape.socketOutline, shape.radiusMm, shape.exaggeration, directionDeg)
  const at = pointAt(directionDeg, RECESS_RADIUS * share)
  if (!isClose) {
    return <circle cx={at.x} cy={at.y} r="4" fill="var(--board)" stroke="var(--ink-soft)" strokeWidth="1.5" />
  }
  const inwards = pointAt(directionDeg, RECESS_RADIUS * share - 16)
  return (
    <g>
      <path
        d={`M${String(at.x)} ${String(at.y)}L${String(inwards.x)} ${String(inwards.y)}`}
        stroke="var(--warn)"
        strokeWidth="2.5"
      />
      <circle cx={at.x} cy={at.y} r="5.5" fill="var(--warn)" />
    </g>
  )
}

function Protractor() {
  return PROTRACTOR.map(({ angleDeg, length, label }) => {
    const from = handleAt(angleDeg, PROTRACTOR_RADIUS)
    const to = handleAt(angleDeg, PROTRACTOR_RADIUS + length)
    const text = handleAt(angleDeg, PROTRACTOR_RADIUS + 19)
    return (
      <g key={angleDeg}>
        <path
          d={`M${String(from.x)} ${String(from.y)}L${String(to.x)} ${String(to.y)}`}
          stroke="var(--ink)"
          strokeWidth={label ? 1.5 : 1}
        />
        {label ? (
          <text
            x={text.x}
            y={text.y + (angleDeg === 90 ? 5 : 0)}
            textAnchor={angleDeg === 0 ? 'middle' : 'start'}
            fontWeight="600"
            fill="var(--ink)"
          >
            {label}
          </text>
        ) : null}
      </g>
    )
  })
}

function Words({ turned }: { turned: LidTurned }) {
  return (
    <g textAnchor="middle" className="[--figure-ground:var(--wash)]">
      <text
        className="halo"
        x={FRAME.x}
        y={FRAME.y}
        fontSize="20"
        fontWeight="600"
        fill={turned.feel === 'binds' ? 'var(--warn)' : 'var(--ink)'}
      >
        {turned.words.feel}
      </text>
      <text className="halo" x={FRAME.x} y={FRAME.y + 22} fill="var(--ink)">
        {turned.words.turned}
      </text>
    </g>
  )
}

type HandleProps = { angleDeg: number; follow: (event: PointerEvent<SVGGElement>) => void }

/** 30 px to see, 44 to touch. The slider beside the drawing is the same handle for keys and for those who listen. */
function Handle({ angleDeg, follow }: HandleProps) {
  const at = handleAt(angleDeg, HANDLE_RADIUS)
  const from = handleAt(angleDeg, 52)
  return (
    <g
      aria-hidden="true"
      onPointerDown={(event) => {
        event.currentTarget.setPointerCapture(event.pointerId)
        follow(event)
      }}
      onPointerMove={(event) => {
        if (event.currentTarget.hasPointerCapture(event.pointerId)) follow(event)
      }}
      // A drag of the handle must not scroll the page away under the finger.
      style={{ touchAction: 'none', cursor: 'grab' }}
    >
      <path
        d={`M${String(from.x)} ${String(from.y)}L${String(at.x)} ${String(at.y)}`}
        stroke="var(--heart)"
        strokeWidth="3"
      />
      <circle cx={at.x} cy={at.y} r="24" fill="transparent" />
      <circle cx={at.x} cy={at.y} r="15" fill="var(--heart)" stroke="var(--board)" strokeWidth="2" />
      <path
        d="M-6 -3q6 -4 12 0m0 0l-1 -4m1 4l-4 0M6 4q-6 4 -12 0m0 0l1 4m-1 -4l4 0"
        transform={`translate(${String(at.x)} ${String(at.y)}) rotate(${String(angleDeg)})`}
        fill="none"
        stroke="var(--on-heart)"
        strokeWidth="1.5"
      />
    </g>
  )
}
