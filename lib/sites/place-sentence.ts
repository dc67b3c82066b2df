import { say, strong, type TextPart } from '@/lib/format/sentence'
import { may, type Role } from './permissions'

const small = [
  'No',
  'One',
  'Two',
  'Three',
  'Four',
  'Five',
  'Six',
  'Seven',
  'Eight',
  'Nine',
  'Ten',
  'Eleven',
  'Twelve',
]
const inWords = (count: number): string => small[count] ?? String(count)

/** The sentence over People and place. Members and invitations only where they may be seen. */
export function placeSentence(
  siteName: string,
  members: readonly { role: Role }[] | undefined,
  invitations: readonly unknown[] | undefined,
): TextPart[] {
  const site = strong(siteName)
  if (members === undefined) return say`${site} is shared with you.`
  const changers = members.filter((member) => may(member.role, 'rooms:change')).length
  const open = invitations?.length ?? 0
  const waiting =
    open === 0
      ? ''
      : open === 1
        ? ', and one invitation is waiting'
        : `, and ${inWords(open).toLowerCase()} invitations are waiting`
  if (members.length === 1) return say`You have ${site} to yourself${waiting}.`
  const can = inWords(changers).toLowerCase()
  return say`${inWords(members.length)} people share ${site}; ${can} of them can change things${waiting}.`
}
