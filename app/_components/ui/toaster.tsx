'use client'

import { useTheme } from 'next-themes'
import { Toaster as Sonner } from 'sonner'

/** Short words about what was just done. Anything that must not be missed stands on the page instead. */
export function Toaster() {
  const { resolvedTheme } = useTheme()
  return (
    <Sonner
      theme={resolvedTheme === 'dark' ? 'dark' : 'light'}
      position="bottom-center"
      mobileOffset={{ bottom: 88 }}
      toastOptions={{
        unstyled: true,
        classNames: {
          toast:
            'flex w-full items-center gap-3 rounded border border-edge bg-board px-4 py-3 font-sans text-body text-ink shadow-menu',
          title: 'font-semibold',
          description: 'text-ink-soft text-label',
          icon: 'hidden',
          error: 'border-l-[6px] border-l-warn',
          success: 'border-l-[6px] border-l-good',
        },
      }}
    />
  )
}
