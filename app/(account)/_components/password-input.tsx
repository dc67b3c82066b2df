'use client'

import { type ComponentProps, useState } from 'react'
import { Input } from '@/app/_components/ui/input'

/** A password that can be looked at: typing blind with dusty fingers is how people get locked out. */
export function PasswordInput(props: Omit<ComponentProps<'input'>, 'type'>) {
  const [isShown, setIsShown] = useState(false)
  return (
    <span className="relative block">
      <Input {...props} type={isShown ? 'text' : 'password'} className="pr-20" />
      <button
        type="button"
        aria-pressed={isShown}
        aria-label={isShown ? 'Hide the password' : 'Show the password'}
        onClick={() => {
          setIsShown((shown) => !shown)
        }}
        className="absolute inset-y-0 right-0 min-h-11 min-w-11 px-3 text-heart"
      >
        {isShown ? 'Hide' : 'Show'}
      </button>
    </span>
  )
}
