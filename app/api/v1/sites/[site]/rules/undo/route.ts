import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { undoRule } from '@/app/_server/rules'
import { ruleUndoSchema } from '@/lib/notices/rule-view'

export const POST = siteRoute(
  { action: 'rules:change', body: ruleUndoSchema, ifMatch: true },
  async ({ db, member, body, ifMatch, now }) => {
    const rule = await undoRule(db, member, ifMatch, body.rule, now)
    return rule.ok ? answer(rule.value, { etag: rule.value.version }) : rule
  },
)
