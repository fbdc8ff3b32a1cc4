import { z } from "zod"

const email = z.string().trim().max(254).pipe(z.email("Write the address as name@shop.example."))

const line = (what: string) =>
  z
    .string()
    .trim()
    .min(2, `Write ${what}.`)
    .max(80, "Use at most 80 characters.")
    .regex(/^[^\p{Cc}<>]*$/u, "Leave out angle brackets and line breaks.")

export const signUpInput = z.strictObject({
  name: line("your name"),
  organisation: line("the name of your shop or brand"),
  email,
  password: z.string().min(1, "Choose a password."),
})

export const signInInput = z.strictObject({ email, password: z.string().min(1, "Write your password.") })

const code = z.string().trim().min(6, "Write the six digits, or a recovery code.").max(60)

export const codeInput = z.strictObject({ code })

export const stepUpInput = z.union([
  z.strictObject({ password: z.string().min(1, "Write your password.").max(500) }),
  codeInput,
])

export const personNameInput = z.strictObject({ name: line("your name") })

export const passwordChangeInput = z.strictObject({
  present: z.string().min(1, "Write your present password.").max(500),
  password: z.string().min(1, "Choose a password.").max(500),
})

export const ofSession = z.strictObject({ ended_id: z.string() })

export const signInLinkInput = z.strictObject({ email })

export const resetRequestInput = z.strictObject({ email })

export const ofLink = z.strictObject({ token: z.string().max(200) })

export const invitedInput = z.strictObject({
  name: line("your name"),
  password: z.string().min(1, "Choose a password."),
})

export const resetInput = z.strictObject({
  token: z.string().max(200),
  password: z.string().min(1, "Choose a password."),
})
