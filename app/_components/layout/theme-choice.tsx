'use client'

import { useTheme } from 'next-themes'
import { useSyncExternalStore } from 'react'

const never = () => () => undefined

/** Light, dark, or as the device has it. The choice is known only in the browser, so the server draws the default. */
export function ThemeChoice() {
  const { theme, setTheme } = useTheme()
  const inBrowser = useSyncExternalStore(
    never,
    () => true,
    () => false,
  )
  return (
    <label className="inline-flex items-center gap-2 text-label text-ink-soft">
      Colours
      <select
        value={inBrowser ? (theme ?? 'system') : 'system'}
        onChange={(event) => {
          setTheme(event.target.value)
        }}
        className="min-h-11 rounded border border-edge bg-board px-2 text-ink"
      >
        <option value="system">As the device</option>
        <option value="light">Light</option>
        <option value="dark">Dark</option>
      </select>
    </label>
  )
}
