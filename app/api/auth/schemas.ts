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
