import type { ReactNode } from 'react'

export type PageIconName =
  'now' | 'rooms' | 'sensors' | 'pieces' | 'carry' | 'seasons' | 'notices' | 'place' | 'more'

/** The pages' own outlines, 20 px with a 1.5 px stroke, always beside the word. */
export function PageIcon({ name, size = 20 }: { name: PageIconName; size?: number }) {
  return (
    <svg
      aria-hidden="true"
      width={size * 1.1}
      height={size}
      viewBox="0 0 22 20"
      fill="none"
      stroke="currentColor"
      strokeWidth={1.5}
      className="shrink-0"
    >
      {outlines[name]}
    </svg>
  )
}

/** Spigot and recess, seen from the end, a little oval. */
export function Logo({ size = 26 }: { size?: number }) {
  return (
    <svg aria-hidden="true" width={size} height={size * 0.88} viewBox="0 0 32 28" className="shrink-0">
      <ellipse cx="16" cy="14" rx="14.5" ry="12.5" fill="none" stroke="var(--ink)" strokeWidth="2.4" />
      <ellipse
        cx="16"
        cy="14"
        rx="8.4"
        ry="9.6"
        transform="rotate(-24 16 14)"
        fill="var(--heart)"
        stroke="var(--ink)"
        strokeWidth="1.2"
      />
    </svg>
  )
}

const solid = { fill: 'currentColor', stroke: 'none' }

const outlines: Record<PageIconName, ReactNode> = {
  now: (
    <>
      <path d="M1 9h20v8H1z" />
      <path d="M4.5 17v-3M8 17v-4M11 17v-3M14.5 17v-4M18 17v-3" strokeWidth={1.25} />
      <rect x="6" y="3" width="5" height="5" {...solid} />
    </>
  ),
  rooms: (
    <>
      <rect x="1" y="6" width="8" height="8" {...solid} />
      <path d="m16 5 5 5-5 5-5-5z" />
    </>
  ),
  sensors: (
    <>
      <path d="M1 17h20M4.5 17v-4.5M11 17v-8M17.5 17V6" />
      <circle cx="4.5" cy="10.7" r="1.8" />
      <circle cx="11" cy="7.2" r="1.8" />
      <circle cx="17.5" cy="4" r="2.4" {...solid} />
    </>
  ),
  pieces: (
    <>
      <circle cx="11" cy="2.6" r="1.6" />
      <path d="M4.5 10c0-4 3-5.8 6.5-5.8s6.5 1.8 6.5 5.8z" />
      <path d="M5.5 10h11v9h-11z" />
    </>
  ),
  carry: (
    <>
      <path d="M1.5 11.5c0-3 1.8-4.3 4.3-4.3s4.3 1.3 4.3 4.3z" />
      <path d="M2.5 11.5h6.6V18H2.5z" />
      <path d="M14.5 19V1.5h5V19" />
      <path d="M17.3 10v1.6" />
    </>
  ),
  seasons: (
    <>
      <path d="M1 2.5h20v3.5H1z" />
      <path d="M4 6v7M7.5 6v10.5M11 6v12.5M14.5 6v9M18 6v5" />
    </>
  ),
  notices: (
    <>
      <path d="M2.5 16.5h17c-2.4-2-2.6-4-2.6-7.5 0-3.6-2.4-6-5.9-6s-5.9 2.4-5.9 6c0 3.5-.2 5.5-2.6 7.5z" />
      <path d="M9.5 18.6c.8.9 2.2.9 3 0" />
    </>
  ),
  place: (
    <>
      <path d="M2 8.5 11 1.5l9 7V18.5H2z" strokeLinejoin="round" />
      <circle cx="8" cy="12.5" r="2" />
      <circle cx="14" cy="12.5" r="2.5" {...solid} />
    </>
  ),
  more: <path d="M2 5h18M2 10h18M2 15h18" />,
}
