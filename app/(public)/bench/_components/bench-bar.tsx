'use client'

import { Printer } from 'lucide-react'
import Link from 'next/link'
import { usePathname } from 'next/navigation'
import { Button } from '@/app/_components/ui/button'
import { classNames } from '@/app/_components/ui/class-names'
import { SentenceSelect } from '@/app/_components/ui/sentence-control'
import { tools } from './tools'
import { useUnits, withUnits } from './use-units'

/** The bench's own pages, the units they speak in, and paper. */
export function BenchBar() {
  const pathname = usePathname()
  const [units, setUnits] = useUnits()
  return (
    <div className="no-print flex flex-wrap items-center justify-between gap-x-6 gap-y-3 border-y border-line px-4 py-1 sm:px-0">
      <nav aria-label="The bench">
        <ul className="flex flex-wrap gap-x-5">
          {tools.map(({ path, name }) => {
            const isHere = pathname === path
            return (
              <li key={path}>
                <Link
                  href={withUnits(path, units)}
                  aria-current={isHere ? 'page' : undefined}
                  className={classNames(
                    'inline-flex min-h-11 items-center border-b-2 hover:border-edge',
                    isHere ? 'border-heart font-semibold text-heart' : 'border-transparent',
                  )}
                >
                  {name}
                </Link>
              </li>
            )
          })}
        </ul>
      </nav>
      <div className="flex flex-wrap items-center gap-x-3 gap-y-2">
        <SentenceSelect
          label="Units"
          value={units}
          onChange={(event) => {
            setUnits(event.target.value === 'imperial' ? 'imperial' : 'metric')
          }}
        >
          <option value="metric">°C, mm, g</option>
          <option value="imperial">°F, inches, oz</option>
        </SentenceSelect>
        <Button
          variant="quiet"
          onClick={() => {
            window.print()
          }}
        >
          <Printer aria-hidden="true" size={20} strokeWidth={1.5} />
          Print
        </Button>
      </div>
    </div>
  )
}
