import type { Metadata } from 'next'
import { notFound } from 'next/navigation'
import { database } from '@/app/_server/database'
import { requireMember } from '@/app/_server/session'
import { getWood } from '@/app/_server/woods'
import { readerOf } from '@/lib/sites/reader'
import { woodIdSchema } from '@/lib/wood/site-wood'
import { WoodForm } from '../_components/wood-form'

export const metadata: Metadata = { title: 'Figures of a wood' }

type Props = { params: Promise<{ site: string; wood: string }> }

export default async function WoodPage({ params }: Props) {
  const { site, wood: asked } = await params
  const member = await requireMember(site, 'woods:change')
  const id = woodIdSchema.safeParse(asked)
  const wood = id.success ? await getWood(database(), member, id.data) : undefined
  if (wood?.ok !== true || wood.value.isArchived) notFound()
  return (
    <WoodForm
      // A newer version begins the form anew.
      key={wood.value.version}
      reader={readerOf(member, new Date())}
      wood={wood.value}
    />
  )
}
