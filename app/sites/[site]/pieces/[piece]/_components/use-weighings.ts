'use client'

import { useSiteQuery } from '@/app/_components/live/use-site-query'
import type { WeighingsPage } from '@/lib/seasoning/rest-view'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'

/** The weighings of a piece with where it stands, for those who may weigh. */
export const useWeighings = (reader: Reader, pieceId: string, initial: WeighingsPage | null) =>
  useSiteQuery<WeighingsPage>({
    site: reader.site,
    area: 'pieces',
    key: ['weighings', pieceId],
    path: `/pieces/${pieceId}/weighings`,
    initial: initial ?? undefined,
    enabled: may(reader.role, 'pieces:weigh') && initial !== null,
  })
