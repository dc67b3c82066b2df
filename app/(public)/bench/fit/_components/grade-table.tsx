'use client'

import { type Column, DataTable } from '@/app/_components/ui/data-table'
import type { GradeCourse } from '@/lib/fit/grade-course'
import { formatWorkedLength } from '@/lib/fit/worked-figures'
import { formatPoints } from '@/lib/format/figures'
import type { UnitSystem } from '@/lib/sites/site'

type GradeTableProps = { courses: readonly GradeCourse[]; units: UnitSystem }

const either = (pct: number | undefined, without: string): string =>
  pct === undefined ? without : `± ${formatPoints(pct)}`

/** Grade by grade: when each fit is gone in this joint, and when it may bind. */
export function GradeTable({ courses, units }: GradeTableProps) {
  const columns: Column<GradeCourse>[] = [
    { id: 'grade', header: 'Fit', phone: 'title', cell: ({ grade }) => grade },
    {
      id: 'clearance',
      header: 'Clearance',
      phone: 'line',
      cell: ({ clearanceMm }) => formatWorkedLength(clearanceMm, units),
    },
    {
      id: 'gone',
      header: 'Gone at',
      phone: 'line',
      cell: ({ goneAtPct, isBeyondSensors }) => (
        <>
          {either(goneAtPct, 'not worked out')}
          {isBeyondSensors ? ', beyond any sensor' : ''}
        </>
      ),
    },
    {
      id: 'binds',
      header: 'May bind at',
      phone: 'line',
      cell: ({ grade, bindsAtPct }) =>
        either(bindsAtPct, grade === 'snap' ? 'tight from the start' : 'not worked out'),
    },
  ]
  return (
    <DataTable
      caption="What each fit stands in this joint"
      columns={columns}
      rows={courses}
      rowKey={(course) => course.grade}
    />
  )
}
