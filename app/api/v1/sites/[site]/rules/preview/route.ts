import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { previewOfRule } from '@/app/_server/rules'
import { rulePreviewSchema } from '@/lib/notices/rule-view'

// Asks only, and changes nothing: a POST because of the words that it is asked with.
export const POST = siteRoute(
  { action: 'rules:see', body: rulePreviewSchema },
  async ({ db, member, body, now }) => {
    const preview = await previewOfRule(db, member, body, now)
    return preview.ok ? answer(preview.value) : preview
  },
)
