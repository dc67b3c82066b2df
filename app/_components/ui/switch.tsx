'use client'

import { Switch as Radix } from 'radix-ui'

type SwitchProps = {
  /** What is switched, for assistive technology; the word beside the switch says only "On" or "Off". */
  label: string
  checked: boolean
  onCheckedChange: (checked: boolean) => void
  disabled?: boolean
}

export function Switch({ label, checked, onCheckedChange, disabled = false }: SwitchProps) {
  return (
    <span className="inline-flex min-h-11 items-center gap-2">
      <Radix.Root
        aria-label={label}
        checked={checked}
        disabled={disabled}
        onCheckedChange={onCheckedChange}
        className="relative h-6 w-11 rounded border border-edge bg-board before:absolute before:-inset-2.5 data-[state=checked]:border-heart disabled:border-dashed"
      >
        <Radix.Thumb className="block size-4 translate-x-[3px] rounded-none bg-edge transition-transform data-[state=checked]:translate-x-[23px] data-[state=checked]:bg-heart" />
      </Radix.Root>
      <span aria-hidden="true" className="w-8 text-label font-semibold">
        {checked ? 'On' : 'Off'}
      </span>
    </span>
  )
}
