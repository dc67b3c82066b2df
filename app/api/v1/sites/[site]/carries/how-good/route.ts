import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { getTrackRecord } from '@/app/_server/track-record'

export const GET = siteRoute({ action: 'carries:see' }, async ({ db, member }) =>
  answer(await getTrackRecord(db, member)),
)
