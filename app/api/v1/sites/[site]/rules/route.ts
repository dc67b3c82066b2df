import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { changeRule, listRules } from '@/app/_server/rules'
import { ruleChangeSchema } from '@/lib/notices/rule-view'

export const GET = siteRoute({ action: 'rules:see' }, async ({ db, member }) =>
  answer(await listRules(db, member)),
)

// The body names the rule; its version is that of the one rule.
export const PATCH = siteRoute(
  { action: 'rules:change', body: ruleChangeSchema, ifMatch: true },
  async ({ db, member, body, ifMatch, now }) => {
    const rule = await changeRule(db, member, ifMatch, body, now)
    return rule.ok ? answer(rule.value, { etag: rule.value.version }) : rule
  },
)
