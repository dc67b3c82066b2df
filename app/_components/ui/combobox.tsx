'use client'

import { type KeyboardEvent, type ReactNode, useId, useRef, useState } from 'react'
import { classNames } from './class-names'
import { controlClassName } from './control-style'
import { useFieldWiring } from './field'

export type ComboboxOption<Value> = {
  key: string
  value: Value
  /** What the field says once it is chosen. */
  label: string
  detail?: ReactNode
}

type ComboboxProps<Value> = {
  /** Best first, for the words typed so far; narrowed by whoever knows what they mean. */
  options: readonly ComboboxOption<Value>[]
  /** What the field says while nothing is being typed. */
  chosen: string
  /** Key of the option that is chosen now. */
  chosenKey: string
  /** The words typed so far; empty when the list has just been opened. */
  onQuery: (query: string) => void
  onChoose: (value: Value) => void
  onBlur?: () => void
  /** Stands in the list when nothing is found. */
  none: string
}

/** A field that finds as one types: text above, a list below, keys and touch alike. */
export function Combobox<Value>(props: ComboboxProps<Value>) {
  const { options, chosen, chosenKey, onQuery, onChoose, onBlur, none } = props
  const listId = useId()
  /** What is being typed; null while the field shows what is chosen. */
  const [typed, setTyped] = useState<string | null>(null)
  const [isOpen, setIsOpen] = useState(false)
  const [active, setActive] = useState(0)
  const list = useRef<HTMLUListElement>(null)
  const optionId = (index: number) => `${listId}-${String(index)}`

  const search = (query: string) => {
    setActive(0)
    onQuery(query)
    setIsOpen(true)
  }
  const close = () => {
    setTyped(null)
    setIsOpen(false)
  }
  const choose = (option: ComboboxOption<Value>) => {
    close()
    onChoose(option.value)
  }
  const goTo = (index: number) => {
    const to = Math.max(0, Math.min(options.length - 1, index))
    setActive(to)
    list.current?.children[to]?.scrollIntoView({ block: 'nearest' })
  }
  const onKeyDown = (event: KeyboardEvent<HTMLInputElement>) => {
    if (event.key === 'ArrowDown' || event.key === 'ArrowUp') {
      event.preventDefault()
      if (isOpen) goTo(active + (event.key === 'ArrowDown' ? 1 : -1))
      else search('')
    } else if (isOpen && event.key === 'Enter') {
      // The list answers; the form is not sent by it.
      event.preventDefault()
      const option = options[active]
      if (option) choose(option)
    } else if (isOpen && event.key === 'Escape') {
      event.stopPropagation()
      close()
    }
  }

  return (
    <span className="relative block">
      <input
        {...useFieldWiring()}
        role="combobox"
        type="text"
        autoComplete="off"
        spellCheck={false}
        maxLength={60}
        aria-autocomplete="list"
        aria-expanded={isOpen}
        aria-controls={listId}
        aria-activedescendant={isOpen && options.length > 0 ? optionId(active) : undefined}
        value={typed ?? chosen}
        onChange={(event) => {
          setTyped(event.target.value)
          search(event.target.value)
        }}
        onFocus={(event) => {
          event.target.select()
        }}
        onClick={() => {
          if (!isOpen) search('')
        }}
        onKeyDown={onKeyDown}
        onBlur={() => {
          const [only, other] = options
          // Typed so far that one is meant: it needs no further press.
          if (isOpen && typed?.trim() && only && !other) choose(only)
          else close()
          onBlur?.()
        }}
        className={controlClassName}
      />
      <ul
        ref={list}
        id={listId}
        role="listbox"
        aria-label="What answers to it"
        hidden={!isOpen}
        className="absolute inset-x-0 top-full z-30 mt-1 max-h-72 overflow-y-auto rounded border border-edge bg-board shadow-menu"
      >
        {options.map((option, index) => (
          <li
            key={option.key}
            id={optionId(index)}
            role="option"
            aria-selected={option.key === chosenKey}
            // Pressing must not take the focus out of the field before the press counts.
            onMouseDown={(event) => {
              event.preventDefault()
            }}
            onClick={() => {
              choose(option)
            }}
            className={classNames(
              'flex min-h-11 cursor-pointer flex-wrap items-center gap-x-3 px-3 py-1.5 aria-selected:font-semibold',
              index === active && 'bg-wash outline-2 -outline-offset-2 outline-heart',
            )}
          >
            <span>{option.label}</span>
            {option.detail ? <span className="text-label text-ink-soft">{option.detail}</span> : null}
          </li>
        ))}
        {options.length === 0 ? (
          <li role="option" aria-selected={false} aria-disabled="true" className="px-3 py-2 text-ink-soft">
            {none}
          </li>
        ) : null}
      </ul>
    </span>
  )
}
