'use client'

import Link from 'next/link'
import { parseAsStringLiteral, useQueryState } from 'nuqs'
import { useSiteQuery } from '@/app/_components/live/use-site-query'
import { Field } from '@/app/_components/ui/field'
import { PageSentence } from '@/app/_components/ui/page-sentence'
import { Select } from '@/app/_components/ui/select'
import { TextLink } from '@/app/_components/ui/text-link'
import { may } from '@/lib/sites/permissions'
import { placeSentence } from '@/lib/sites/place-sentence'
import type { Reader } from '@/lib/sites/reader'
import type { OwnSettings } from '@/lib/notices/own-settings'
import type { Invitation, Member, Site } from '@/lib/sites/site'
import { DeleteSite } from './delete-site'
import { DoorsPart } from './doors-part'
import { MembersPart } from './members-part'
import { SettingsPart } from './settings-part'

const parts = ['members', 'place', 'doors', 'delete'] as const
type Part = (typeof parts)[number]

type List<Item> = { items: Item[] }

type PlaceViewProps = {
  reader: Reader
  site: Site
  /** Absent for readers who may not see them. */
  members: List<Member> | null
  invitations: List<Invitation> | null
  settings: OwnSettings
  timeZones: readonly string[]
}

export function PlaceView({
  reader,
  site: initialSite,
  members,
  invitations,
  settings,
  timeZones,
}: PlaceViewProps) {
  const [part, setPart] = useQueryState('part', parseAsStringLiteral(parts).withDefault('members'))
  const { data: site = initialSite } = useSiteQuery<Site>({
    site: reader.site,
    area: 'frame',
    key: ['settings'],
    path: '',
    initial: initialSite,
  })
  const { data: memberList } = useSiteQuery<List<Member>>({
    site: reader.site,
    area: 'members',
    path: '/members',
    initial: members ?? undefined,
    enabled: members !== null,
  })
  const { data: invitationList } = useSiteQuery<List<Invitation>>({
    site: reader.site,
    area: 'members',
    key: ['invitations'],
    path: '/invitations',
    initial: invitations ?? undefined,
    enabled: invitations !== null,
  })
  const names: Record<Part, string> = {
    members: 'Members and roles',
    place: 'Units and place',
    doors: 'Screens by a door',
    delete: site.isDemo ? 'Remove the demo' : 'Delete the site',
  }
  const needed = { delete: 'site:delete', doors: 'doors:see' } as const
  const shown = parts.filter((one) => one === 'members' || one === 'place' || may(reader.role, needed[one]))
  const current = shown.includes(part) ? part : 'members'
  const choose = (wanted: string) => {
    const chosen = shown.find((one) => one === wanted)
    if (chosen) void setPart(chosen)
  }
  const content =
    current === 'members' ? (
      <MembersPart
        reader={reader}
        members={memberList?.items ?? null}
        invitations={invitationList?.items ?? null}
      />
    ) : current === 'place' ? (
      <SettingsPart reader={reader} site={site} settings={settings} timeZones={timeZones} />
    ) : current === 'doors' ? (
      <DoorsPart reader={reader} />
    ) : (
      <DeleteSite reader={reader} site={site} />
    )

  return (
    <>
      <PageSentence parts={placeSentence(site.name, memberList?.items, invitationList?.items)} />
      <div className="px-4 sm:hidden">
        <Field label="Part of People and place">
          <Select
            value={current}
            onChange={(event) => {
              choose(event.target.value)
            }}
          >
            {shown.map((one) => (
              <option key={one} value={one}>
                {names[one]}
              </option>
            ))}
          </Select>
        </Field>
      </div>
      <nav aria-label="Parts of People and place" className="max-sm:hidden">
        <ul className="inline-flex rounded border border-edge bg-board">
          {shown.map((one, index) => (
            <li key={one} className={index > 0 ? 'border-l border-edge' : undefined}>
              <Link
                href={`?part=${one}`}
                scroll={false}
                aria-current={one === current ? 'page' : undefined}
                className="inline-flex min-h-11 items-center px-4 aria-[current]:bg-ink aria-[current]:font-semibold aria-[current]:text-board"
              >
                {names[one]}
              </Link>
            </li>
          ))}
        </ul>
      </nav>
      {may(reader.role, 'woods:see') ? (
        <p className="max-sm:px-4">
          <TextLink href={`/sites/${reader.site}/place/woods`} className="inline-flex min-h-11 items-center">
            Woods
          </TextLink>{' '}
          <span className="text-ink-soft">and their figures, those of your own too</span>
        </p>
      ) : null}
      {content}
    </>
  )
}
