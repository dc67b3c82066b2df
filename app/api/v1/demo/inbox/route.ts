import { z } from 'zod'
import { readDemoInbox } from '@/app/_server/demo'
import { listQueryShape } from '@/app/_server/list'
import { answer } from '@/app/_server/respond'
import { publicRoute } from '@/app/_server/route'

const query = z.strictObject(listQueryShape(['-at']))

export const GET = publicRoute({ query }, async ({ db, query }) => {
  const page = await readDemoInbox(db, query)
  return page.ok ? answer(page.value) : page
})
