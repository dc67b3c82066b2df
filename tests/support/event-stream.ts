import { inject } from 'vitest'

export interface EventStream {
  status: number
  contentType: string | null
  /** What has come so far, one entry for each event. */
  events: { kind: string; id: string | null }[]
  /** Settles once the server has ended the stream. */
  ended: Promise<void>
  close(): void
}

/** Listens to a site's stream of changes as an open page does. */
export async function openStream(siteCode: string, cookie: string): Promise<EventStream> {
  const { webUrl } = inject('stack')
  const controller = new AbortController()
  const response = await fetch(`${webUrl}/api/v1/sites/${siteCode}/live`, {
    headers: { cookie, accept: 'text/event-stream' },
    signal: controller.signal,
  })
  const events: EventStream['events'] = []
  const read = async (): Promise<void> => {
    const decoder = new TextDecoder()
    let text = ''
    for await (const chunk of response.body ?? []) {
      text += decoder.decode(chunk as Uint8Array, { stream: true })
      const blocks = text.split('\n\n')
      text = blocks.pop() ?? ''
      for (const block of blocks) {
        const data = /^data: (.*)$/m.exec(block)?.[1]
        if (data !== undefined) events.push(JSON.parse(data) as EventStream['events'][number])
      }
    }
  }
  const ended = read().catch((error: unknown) => {
    if (!controller.signal.aborted) throw error
  })
  return {
    status: response.status,
    contentType: response.headers.get('content-type'),
    events,
    ended,
    close: () => controller.abort(),
  }
}
