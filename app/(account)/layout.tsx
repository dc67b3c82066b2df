import type { ReactNode } from 'react'
import { PublicShell } from '@/app/_components/layout/public-shell'

export default function AccountLayout({ children }: { children: ReactNode }) {
  return <PublicShell narrow>{children}</PublicShell>
}
