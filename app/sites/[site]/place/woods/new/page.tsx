import type { Metadata } from 'next'
import { requireMember } from '@/app/_server/session'
import { readerOf } from '@/lib/sites/reader'
import { WoodForm } from '../_components/wood-form'

export const metadata: Metadata = { title: 'A wood of your own' }

export default async function NewWoodPage({ params }: { params: Promise<{ site: string }> }) {
  const member = await requireMember((await params).site, 'woods:change')
  return <WoodForm reader={readerOf(member, new Date())} wood={undefined} />
}
