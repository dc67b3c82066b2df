/**
 * The number to offer for the next piece: one more than the last, in the maker's own way of writing it.
 * @param last the last number given, such as "214" or "24-07"; undefined for the first
 * @returns digits at the end counted on, as wide as they were; empty where there are none to count
 */
export function nextNumber(last: string | undefined): string {
  if (last === undefined) return '1'
  const digits = /\d{1,9}$/.exec(last)?.[0]
  if (digits === undefined) return ''
  return last.slice(0, -digits.length) + String(Number(digits) + 1).padStart(digits.length, '0')
}
