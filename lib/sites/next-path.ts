/**
 * The page to go to after signing in, as far as it is one of ours.
 * @returns `undefined` for anything that a browser might read as another site: full addresses, `//host`, `/\host`,
 * control characters (also written as %0d and the like), and addresses of the API
 */
export function safeNextPath(given: string | null | undefined): string | undefined {
  if (given === null || given === undefined || given.length > 512 || !given.startsWith('/')) return undefined
  if (/[\\\p{Cc}]/u.test(given) || /%(?:0[0-9a-f]|1[0-9a-f]|7f|5c)/i.test(given)) return undefined
  const here = 'http://here.invalid'
  if (!URL.canParse(given, here)) return undefined
  const url = new URL(given, here)
  if (url.origin !== here || url.pathname.startsWith('//') || /^\/api(\/|$)/.test(url.pathname))
    return undefined
  return url.pathname + url.search + url.hash
}

/** The same for a query value as Next hands it over, with the list of one's own sites where there is none of ours. */
export const nextPath = (given: string | string[] | undefined): string =>
  (typeof given === 'string' ? safeNextPath(given) : undefined) ?? '/sites'
