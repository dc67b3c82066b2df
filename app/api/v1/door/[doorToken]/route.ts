import { getDoorView } from '@/app/_server/door-view'
import { answer } from '@/app/_server/respond'
import { publicRoute } from '@/app/_server/route'
import { doorTokenSchema } from '@/lib/door/door'

/** What the screen by a door asks for again and again; the link itself is the key. */
export const GET = publicRoute({ params: { doorToken: doorTokenSchema } }, async ({ db, params, now }) => {
  const view = await getDoorView(db, params.doorToken, now)
  return view.ok ? answer(view.value) : view
})
