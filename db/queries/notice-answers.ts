import type { Kysely } from 'kysely'
import { answerSchema, type Answer } from '@/lib/notices/answer'
import type { AnswerVia } from '@/lib/notices/answers'
import type { Database } from '../schema'

export interface AnswerRecord {
  noticeId: number
  userId: string
  userName: string
  answer: Answer
  at: Date
  until: Date | null
}

export async function insertAnswer(
  db: Kysely<Database>,
  siteId: number,
  given: { noticeId: number; userId: string; answer: Answer; until: Date | null; via: AnswerVia },
  now: Date,
): Promise<void> {
  await db
    .insertInto('notice_answer')
    .values({
      site_id: siteId,
      notice_id: given.noticeId,
      user_id: given.userId,
      answer: given.answer,
      at: now,
      until: given.until,
      via: given.via,
    })
    .execute()
}

/** Each person's newest answer to each of these notices, the newest last. */
export async function listAnswers(
  db: Kysely<Database>,
  siteId: number,
  noticeIds: readonly number[],
): Promise<AnswerRecord[]> {
  if (noticeIds.length === 0) return []
  const rows = await db
    .selectFrom('notice_answer as answer')
    .innerJoin('user', 'user.id', 'answer.user_id')
    .where('answer.site_id', '=', siteId)
    .where('answer.notice_id', 'in', noticeIds)
    .distinctOn(['answer.notice_id', 'answer.user_id'])
    .select([
      'answer.notice_id',
      'answer.user_id',
      'user.name',
      'answer.answer',
      'answer.at',
      'answer.until',
      'answer.id',
    ])
    .orderBy('answer.notice_id')
    .orderBy('answer.user_id')
    .orderBy('answer.id', 'desc')
    .execute()
  return rows
    .map((row) => ({
      noticeId: row.notice_id,
      userId: row.user_id,
      userName: row.name,
      answer: answerSchema.parse(row.answer),
      at: row.at,
      until: row.until,
    }))
    .toSorted((a, b) => a.at.getTime() - b.at.getTime())
}
