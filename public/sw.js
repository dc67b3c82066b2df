// Shows notices on this device, and carries the answers that are pressed on them. It keeps nothing and fetches no pages.

self.addEventListener('install', () => self.skipWaiting())
self.addEventListener('activate', (event) => event.waitUntil(self.clients.claim()))

self.addEventListener('push', (event) => {
  const message = event.data?.json() ?? {}
  event.waitUntil(
    self.registration.showNotification(message.title ?? 'Lidfast', {
      body: message.body ?? '',
      // A later message about the same takes the place of the earlier one.
      tag: message.tag,
      // At work in the shop: seen, not heard.
      silent: message.silent === true,
      icon: '/icon.svg',
      data: { url: message.url ?? '/', actions: message.actions ?? [] },
      actions: (message.actions ?? []).map(({ action, title }) => ({ action, title })),
    }),
  )
})

self.addEventListener('notificationclick', (event) => {
  const { url, actions } = event.notification.data ?? {}
  const pressed = (actions ?? []).find(({ action }) => action === event.action)
  event.notification.close()
  event.waitUntil(pressed === undefined ? open(url) : answer(pressed, url))
})

/** The link says who answers and what; it works once. When it can't be done, the page is opened instead. */
async function answer({ token, title }, url) {
  const response = await fetch(`/api/v1/answers/${encodeURIComponent(token)}`, {
    method: 'POST',
    headers: { 'content-type': 'application/json' },
    body: '{}',
  }).catch(() => undefined)
  if (response?.ok !== true) return open(url)
  await self.registration.showNotification(`${title}: set down.`, { tag: 'lidfast answered', silent: true })
}

async function open(address) {
  const url = new URL(address ?? '/', self.location.origin)
  // Only pages of ours are opened, whatever a message says.
  if (url.origin !== self.location.origin) return
  const windows = await self.clients.matchAll({ type: 'window', includeUncontrolled: true })
  for (const client of windows) {
    if (client.url === url.href && 'focus' in client) return client.focus()
  }
  return self.clients.openWindow(url.href)
}
