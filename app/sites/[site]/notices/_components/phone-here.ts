'use client'

import { useEffect, useState } from 'react'

/** What a browser hands out when it signs up. */
export type Subscription = { endpoint: string; keys: { p256dh: string; auth: string } }

/** Why this browser can't be signed up; undefined when it can. */
function whyNot(): string | undefined {
  if (!window.isSecureContext)
    return 'Off here: a browser shows notices only on pages with https. The README says how to put it in front.'
  if (!('serviceWorker' in navigator) || !('PushManager' in window) || !('Notification' in window))
    return 'Off here: this browser can’t. On an iPhone or iPad, add the page to the home screen first.'
  if (Notification.permission === 'denied')
    return 'Off here: the browser was told not to show notices from this address. Its settings change that.'
  return undefined
}

/** This browser's own subscription, and whether it can have one. Known only once the page runs. */
export function usePhoneHere() {
  const [why, setWhy] = useState<string | undefined>('Looking at this browser.')
  const [endpoint, setEndpoint] = useState<string>()
  useEffect(() => {
    let isGone = false
    const look = async () => {
      const reason = whyNot()
      const registration =
        reason === undefined ? await navigator.serviceWorker.getRegistration('/') : undefined
      const subscription = await registration?.pushManager.getSubscription()
      if (isGone) return
      setWhy(reason)
      setEndpoint(subscription?.endpoint)
    }
    void look()
    return () => {
      isGone = true
    }
  }, [])
  return { why, endpoint, setEndpoint }
}

/**
 * Asks the person, then the browser.
 * @returns undefined when the person said no
 */
export async function signUpHere(key: string): Promise<Subscription | undefined> {
  if ((await Notification.requestPermission()) !== 'granted') return undefined
  await navigator.serviceWorker.register('/sw.js')
  const registration = await navigator.serviceWorker.ready
  const { endpoint, keys } = (
    await registration.pushManager.subscribe({ userVisibleOnly: true, applicationServerKey: key })
  ).toJSON()
  if (endpoint === undefined || keys?.p256dh === undefined || keys.auth === undefined)
    throw new Error('The browser gave out no address.')
  return { endpoint, keys: { p256dh: keys.p256dh, auth: keys.auth } }
}

/** A few words for the list: "Firefox on Android". */
export function browserName(userAgent: string): string {
  const browser = /Firefox|Edg|OPR|Chrome|Safari/.exec(userAgent)?.[0] ?? 'A browser'
  const system = /Android|iPhone|iPad|Windows|Mac OS X|Linux/.exec(userAgent)?.[0]
  const named = { Edg: 'Edge', OPR: 'Opera' }[browser] ?? browser
  return system === undefined ? named : `${named} on ${system}`
}
