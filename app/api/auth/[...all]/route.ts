import { answerAuth } from '@/app/_server/auth-door'

export const GET = answerAuth
export const POST = answerAuth
