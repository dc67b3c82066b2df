import { liveStream } from '@/app/_server/live'
import { siteRoute } from '@/app/_server/route'

export const dynamic = 'force-dynamic'

const stream = siteRoute({ action: 'site:see' }, ({ request, member }) => liveStream(request, member))

export async function GET(request: Request, context: { params: Promise<unknown> }): Promise<Response> {
  const response = await stream(request, context)
  // Packed on the way, events would wait in a buffer until it is full.
  if (response.ok) response.headers.set('cache-control', 'no-store, no-transform')
  return response
}
