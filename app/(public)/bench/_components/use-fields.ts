'use client'

import { parseAsString, useQueryStates } from 'nuqs'
import { useState } from 'react'
import { fieldValue, type Field } from '@/lib/bench/fields'
import { useUnits } from './use-units'

type Texts<Key extends string> = Record<Key, string>

export type Fields<Key extends string> = {
  readonly fields: Readonly<Record<Key, Field>>
  readonly texts: Texts<Key>
  readonly set: (change: Partial<Texts<Key>>) => void
  /** NaN where one is left out or not asked for; undefined as long as one of them is refused. */
  readonly values: Record<Key, number> | undefined
  /** What is refused and why, by field. */
  readonly refusals: Partial<Record<Key, string>>
}

const parsersOf = <Key extends string>(fields: Readonly<Record<Key, Field>>) =>
  Object.fromEntries(
    Object.entries<Field>(fields).map(([key, field]) => [key, parseAsString.withDefault(field.start)]),
  ) as Record<Key, ReturnType<typeof parseAsString.withDefault>>

/**
 * The numbers of a page, kept in the address in metric units, so that a link shows the same page to anybody.
 * @param fields one constant of the page's module
 * @param idle fields that the page does not ask for now: they refuse nothing
 */
export function useFields<Key extends string>(
  fields: Readonly<Record<Key, Field>>,
  idle: readonly Key[] = [],
): Fields<Key> {
  const [units] = useUnits()
  const [parsers] = useState(() => parsersOf(fields))
  const [states, setStates] = useQueryStates<Record<Key, ReturnType<typeof parseAsString.withDefault>>>(
    parsers,
    { history: 'replace' },
  )
  const texts = states as Texts<Key>
  const keys = Object.keys(fields) as Key[]
  const values: Partial<Record<Key, number>> = {}
  const refusals: Partial<Record<Key, string>> = {}
  for (const key of keys) {
    const parsed = fieldValue(fields[key], texts[key], units)
    if (parsed.ok) values[key] = parsed.value
    else if (idle.includes(key) || isLeftOut(fields[key], texts[key])) values[key] = Number.NaN
    else refusals[key] = parsed.error
  }
  return {
    fields,
    texts,
    set: (change) => void setStates(change as Parameters<typeof setStates>[0]),
    values: Object.keys(refusals).length === 0 ? (values as Record<Key, number>) : undefined,
    refusals,
  }
}

const isLeftOut = (field: Field, text: string): boolean => field.isOptional === true && text === ''

/** A number that may be left out, or undefined where it is. */
export const told = (value: number): number | undefined => (Number.isNaN(value) ? undefined : value)
