import type { PieceCheck } from '@/lib/carry/carry-check'
import type { Stage } from '@/lib/pieces/piece'
import type { QuietHours } from '@/lib/sites/local-time'
import type { Role } from '@/lib/sites/permissions'
import type { Mark, Rule } from './notice'
import type { RuleBook } from './rule-settings'
import type { Surroundings } from './surroundings'

/** What deciding looks at. All instants are epoch ms; the words are made in the site's zone. */
export interface NoticeInputs {
  site: QuietHours & { lockUpAt: string }
  carries: NoticeCarry[]
  sensors: NoticeSensor[]
  people: NoticePerson[]
  /** What the site chose for its rules. Absent: everything as it comes. */
  rules?: RuleBook
  /** Rooms, pieces at rest and the rest of the yard. Absent: not looked at this time, and nothing is said of it. */
  surroundings?: Surroundings
}

export interface NoticeCarry {
  code: string
  state: 'planned' | 'out'
  plannedAt: number
  stayMinutes: number
  roomName: string
  /** Who planned it; null when that person has left. */
  madeBy: string | null
  /** When the air that its verdict rests on was last read; null: never. */
  airAt: number | null
  /** A plan without named pieces: `pieces` are the boxes that it is judged by. Absent: it names its pieces. */
  takesWhatever?: boolean
  pieces: NoticePiece[]
}

export interface NoticePiece {
  code: string
  number: string
  stage: Stage
  /** Null while it is only planned. A piece that is back is left out. */
  outAt: number | null
  /** Null where nothing can be worked out, as for a blank. */
  check: PieceCheck | null
}

export interface NoticeSensor {
  code: string
  name: string
  roomName: string | null
  lastHeardAt: number | null
  /** Until when its last reading counts as the present air of its room. */
  freshUntil: number | null
  silentFrom: number | null
  /** Numbers of pieces that are out in its room, which nobody then watches. */
  piecesOutThere: string[]
  /** Charge last told, percent of full; null or absent: it never told one. */
  batteryPct?: number | null
}

export interface NoticePerson {
  userId: string
  role: Role
  mailOn: boolean
  onHouseList: boolean
  /** What else they chose. Absent: nothing, so everything is as it comes (`usualWishes`). */
  wishes?: PersonWishes
}

/** How one person wants to be told, beyond mail on or off. */
export interface PersonWishes {
  /** They want it on a phone, and have signed one up. */
  pushOn: boolean
  /** Rules for which they chose otherwise. */
  rules: Partial<Record<Rule, { mailOn: boolean; pushOn: boolean }>>
  /** HH:mm; null: the site's. */
  quiet: { from: string; to: string } | null
  /** IANA; null: the site's. */
  timeZone: string | null
  /** When to hear of what can wait. */
  digest: 'none' | 'daily' | 'weekly'
  /** HH:mm in their zone. */
  digestAt: string
  /** ISO: 1 is Monday. */
  digestWeekday: number
  /** Epoch ms. `coveredBy` hears in their stead; null: the makers do. */
  away: { from: number; until: number; coveredBy: string | null } | null
  /** At work until then, epoch ms: no sound, no mail. */
  sessionUntil: number | null
}

/** How bad a carry looks; a verdict worsens when this rises. */
export const severities = { fine: 0, 'keep-short': 1, unknown: 2, leave: 3 } as const
export type Severity = keyof typeof severities

/** The verdict that counts, and the other one that has to last before it counts (see `verdict-hold.ts`). */
export interface VerdictHold {
  held: Severity
  /** The worst that was told of; "fine" when nothing was. */
  told: Severity
  other: Severity | null
  otherSince: number
  otherReadings: number
  otherAirAt: number | null
}

/** A condition that holds: one episode from its beginning to its end. `key` names the occasion. */
export interface Episode {
  rule: Rule
  subject: string
  key: string
  /** `over`: it has ended by its record; one that nobody saw begin opens in the history without being told. */
  state: 'pending' | 'telling' | 'over'
  beganAt: number
  /** With `over` only. */
  endedAt?: number
  hold?: VerdictHold
}

/** An episode on record: every open one, and those that ended lately. */
export interface KnownEpisode {
  rule: string
  subject: string
  key: string
  isOpen: boolean
  beganAt: number
  /** When it was first told of; null: it never was. */
  toldAt: number | null
  endedAt: number | null
}

/** What somebody answered to a notice. */
export interface NoticeAnswer {
  rule: string
  subject: string
  episodeKey: string
  userId: string
  answer: 'in' | 'going' | 'cant' | 'later' | 'nothing'
  at: number
  /** For "later": when to ask again. */
  until: number | null
}

export interface NoticeState {
  /** Keys of the notices made before. */
  told: ReadonlySet<string>
  /** Holds of the open episodes of planned carries, by subject and key joined with a space. */
  holds: ReadonlyMap<string, VerdictHold>
  /** Absent: none on record. */
  known?: readonly KnownEpisode[]
  /** Of the last days. Absent: none. */
  answers?: readonly NoticeAnswer[]
}

export interface NewNotice {
  key: string
  rule: Rule
  urgency: 'now' | 'soon' | 'whenever'
  mark: Mark
  title: string
  body: string
  link: string
  episode: { rule: Rule; subject: string; key: string }
  carryCode?: string
  pieceCode?: string
  sensorCode?: string
  roomCode?: string
  /** Whom it concerns; how and when each hears of it is their own choice (see `routing.ts`). */
  to: Recipient[]
}

export interface Recipient {
  userId: string
  /** Told at once, quiet hours or not. */
  wakes: boolean
}

export type Channel = 'mail' | 'push'

/** One notice on its way to one person by one channel. `holdUntil`: epoch ms; null: at once. */
export interface PlannedDelivery {
  userId: string
  channel: Channel
  holdUntil: number | null
}

export type RoutedNotice = NewNotice & { deliveries: PlannedDelivery[] }

export interface Decision {
  /** Every condition that holds now. An open episode that is not among them is over. */
  episodes: Episode[]
  notices: RoutedNotice[]
}

/** What one rule adds to the decision. */
export interface RulePart {
  episodes: Episode[]
  notices: NewNotice[]
}
