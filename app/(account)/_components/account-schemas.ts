import { z } from 'zod'

const email = z
  .string()
  .trim()
  .min(1, 'your e-mail address')
  .pipe(z.email('not an e-mail address'))
  .pipe(z.string().max(254))
/** The same bounds as the server's. Length is what makes a password hard to guess; signs are left to people. */
const newPassword = z.string().min(10, '10 letters or more').max(128, '128 letters at most')

export const signInSchema = z.strictObject({ email, password: z.string().min(1, 'your password') })
export type SignIn = z.infer<typeof signInSchema>

export const signUpSchema = z.strictObject({
  name: z.string().trim().min(1, 'what others here may call you').max(80, '80 letters at most'),
  email,
  password: newPassword,
})
export type SignUp = z.infer<typeof signUpSchema>

export const forgottenSchema = z.strictObject({ email })
export type Forgotten = z.infer<typeof forgottenSchema>

export const newPasswordSchema = z.strictObject({ password: newPassword })
export type NewPassword = z.infer<typeof newPasswordSchema>
