/** Records of refused messages that one site gets in a second; a sensor gone wild beyond that is only counted. */
const PER_SECOND = 20

/** Says for each refused message whether it may be recorded. Pure but for the memory of the present second. */
export function createAllowance(nowMs: () => number, perSecond = PER_SECOND): (siteId: number) => boolean {
  const used = new Map<number, number>()
  let second = 0
  return (siteId) => {
    const present = Math.floor(nowMs() / 1000)
    if (present !== second) {
      used.clear()
      second = present
    }
    const n = (used.get(siteId) ?? 0) + 1
    used.set(siteId, n)
    return n <= perSecond
  }
}
