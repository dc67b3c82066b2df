import type { ReactNode } from 'react'
import type { Mark as MarkKind } from '@/lib/notices/notice'
import { classNames } from './class-names'

export const markWords: Record<MarkKind, string> = {
  fine: 'Fine',
  'keep-short': 'Keep it short',
  leave: 'Leave it where it is',
  silent: 'Silent',
  weigh: 'Weigh',
  unknown: 'Not known',
}

const colours: Record<MarkKind, string> = {
  fine: 'text-good',
  'keep-short': 'text-ink',
  leave: 'text-warn',
  silent: 'text-warn',
  weigh: 'text-ink',
  unknown: 'text-ink-soft',
}

/** What each verdict looks like: a shape of its own, so that it reads without its colour. Always beside its words. */
export function Mark({ kind, size = 18, className }: { kind: MarkKind; size?: number; className?: string }) {
  return (
    <svg
      aria-hidden="true"
      width={size}
      height={size}
      viewBox="0 0 20 20"
      fill="none"
      stroke="currentColor"
      strokeWidth={1.75}
      className={classNames('inline-block shrink-0', colours[kind], className)}
    >
      {shapes[kind]}
    </svg>
  )
}

/** A verdict in words behind its mark. */
export function Verdict({ kind, children }: { kind: MarkKind; children?: ReactNode }) {
  return (
    <span
      className={classNames('inline-flex items-baseline gap-2 text-verdict font-semibold', colours[kind])}
    >
      <Mark kind={kind} className="translate-y-[2px]" />
      <span>{children ?? markWords[kind]}</span>
    </span>
  )
}

const shapes: Record<MarkKind, ReactNode> = {
  fine: (
    <>
      <circle cx="10" cy="10" r="9" fill="currentColor" stroke="none" />
      <path d="m5.8 10.4 2.9 2.9 5.6-6" stroke="var(--figure-ground, var(--board))" strokeWidth={2.2} />
    </>
  ),
  'keep-short': (
    <>
      <path d="M4 2h12M4 18h12M5.5 2v2.6c0 2.6 9 6.2 9 9V18M14.5 2v2.6c0 2.6-9 6.2-9 9V18" />
      <path d="M7.2 16.6c.6-1.8 5-1.8 5.6 0z" fill="currentColor" stroke="none" />
    </>
  ),
  leave: (
    <>
      <rect x="1" y="1" width="18" height="18" fill="currentColor" stroke="none" />
      <rect x="4.5" y="8.4" width="11" height="3.2" fill="var(--figure-ground, var(--board))" stroke="none" />
    </>
  ),
  silent: (
    <>
      <path d="M10 2 19 18H1z" strokeLinejoin="round" />
      <path d="M10 7.5v5" strokeWidth={2} />
      <path d="M10 14.2v1.8" strokeWidth={2} />
    </>
  ),
  weigh: (
    <>
      <path d="M10 3v14M6 17.2h8M3 4.6h14" />
      <path d="M4 5 1.6 11h4.8zM16 5l-2.4 6h4.8z" strokeWidth={1.4} />
      <path d="M1.6 11a2.4 2 0 0 0 4.8 0zM13.6 11a2.4 2 0 0 0 4.8 0z" fill="currentColor" stroke="none" />
    </>
  ),
  unknown: (
    <>
      <circle cx="10" cy="10" r="8.2" strokeDasharray="3 2.4" />
      <path d="M6.5 10h7" />
    </>
  ),
}
