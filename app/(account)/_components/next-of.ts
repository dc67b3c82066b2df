import { safeNextPath } from '@/lib/sites/next-path'

/** Where to go after signing in: the address asked for when it is one of ours, else the person's sites. */
export const nextOf = (given: string | string[] | undefined): string =>
  safeNextPath(typeof given === 'string' ? given : undefined) ?? '/sites'
