'use client'

import { Tabs } from 'radix-ui'
import type { ReactNode } from 'react'
import { classNames } from './class-names'

export type Segment = { value: string; label: ReactNode; content?: ReactNode }

type SegmentedTabsProps = {
  /** What is chosen here, for assistive technology. */
  label: string
  segments: readonly Segment[]
  value: string
  onValueChange: (value: string) => void
  /** One panel for all segments, where the caller draws the chosen one itself. */
  children?: ReactNode
  className?: string
}

/** Views of one thing in one frame. The chosen one is ink with chalk letters, so it reads in greyscale. */
export function SegmentedTabs({
  label,
  segments,
  value,
  onValueChange,
  children,
  className,
}: SegmentedTabsProps) {
  return (
    <Tabs.Root value={value} onValueChange={onValueChange} className={className}>
      <Tabs.List
        aria-label={label}
        className="inline-flex max-w-full flex-wrap rounded border border-edge bg-board max-sm:flex"
      >
        {segments.map((segment, index) => (
          <Tabs.Trigger
            key={segment.value}
            value={segment.value}
            className={classNames(
              'min-h-11 px-4 data-[state=active]:bg-ink data-[state=active]:font-semibold data-[state=active]:text-board max-sm:grow',
              index > 0 && 'border-l border-edge',
            )}
          >
            {segment.label}
          </Tabs.Trigger>
        ))}
      </Tabs.List>
      {children === undefined
        ? segments.map((segment) => (
            <Tabs.Content key={segment.value} value={segment.value} tabIndex={-1} className="mt-5">
              {segment.content}
            </Tabs.Content>
          ))
        : segments.map((segment) => (
            <Tabs.Content key={segment.value} value={segment.value} tabIndex={-1} className="mt-5">
              {segment.value === value ? children : null}
            </Tabs.Content>
          ))}
    </Tabs.Root>
  )
}
