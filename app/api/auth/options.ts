import type { NextAuthOptions, User } from "next-auth"
import Credentials from "next-auth/providers/credentials"
import type { z } from "zod"
import { cookieName, isSecure, sessionCookieName } from "@/app/session-cookie"
import { visitorOf } from "@/app/visitor"
import {
  endSession,
  type OpenedSession,
  readSession,
  SESSION_DAYS,
  signIn,
  signInByLink,
  verifyEmail,
} from "@/lib/accounts"
import { env } from "@/lib/env"
import { TarnwrightError } from "@/lib/errors"
import { signUpByInvitation } from "@/lib/team"
import { invitedInput } from "./schemas"

type Fields = Record<string, string> | undefined
type Headers = Record<string, string | undefined> | undefined

/**
 * How next-auth signs people in and out here.
 *
 * Its cookie would hold a signed token that stays good until it is too old. Ours holds the random id of a row in the
 * table `session`: `decode` looks the row up, so a session that was ended on the server is dead at once.
 */
export function authOptions(): NextAuthOptions {
  // next-auth reads its own address from here; PUBLIC_URL is the one place where ours is set.
  process.env.NEXTAUTH_URL = env().PUBLIC_URL
  return {
    secret: env().NEXTAUTH_SECRET,
    useSecureCookies: isSecure(),
    pages: { signIn: "/signin", signOut: "/portal", error: "/signin" },
    session: { strategy: "jwt", maxAge: SESSION_DAYS * 86_400 },
    cookies: {
      sessionToken: cookie(sessionCookieName()),
      csrfToken: cookie(cookieName("tarn-csrf")),
      callbackUrl: cookie(cookieName("tarn-callback")),
    },
    providers: [
      provider("password", { email: {}, password: {}, code: {} }, (fields, headers) =>
        signIn({
          visitor: visitorOf((name) => headers?.[name]),
          input: {
            email: fields?.email ?? "",
            password: fields?.password ?? "",
            code: fields?.code || undefined,
          },
        }),
      ),
      provider("link", { token: {}, code: {} }, (fields, headers) =>
        signInByLink({
          visitor: visitorOf((name) => headers?.[name]),
          input: { token: fields?.token ?? "", code: fields?.code || undefined },
        }),
      ),
      provider("verify", { token: {} }, (fields, headers) =>
        verifyEmail({
          visitor: visitorOf((name) => headers?.[name]),
          input: { token: fields?.token ?? "" },
        }),
      ),
      provider("invitation", { token: {}, name: {}, password: {} }, (fields, headers) =>
        signUpByInvitation({
          visitor: visitorOf((name) => headers?.[name]),
          input: {
            token: fields?.token ?? "",
            ...valid(invitedInput, { name: fields?.name, password: fields?.password }),
          },
        }),
      ),
    ],
    jwt: {
      encode: async ({ token }) => String(token?.session_token ?? ""),
      decode: async ({ token }) => {
        const session = await readSession(token, new Date())
        return session ? { sub: session.person.id, session_token: token } : null
      },
    },
    callbacks: {
      jwt: ({ token, user }) => (user ? { session_token: (user as SignedIn).session_token } : token),
      // What a script could read of the session is nothing that it does not know already.
      session: ({ session }) => ({ expires: session.expires }),
    },
    events: {
      signOut: async ({ token }) => {
        if (typeof token?.session_token === "string") await endSession(token.session_token)
      },
    },
    // A cookie that is no longer good is no fault, and a name of a code is all that may be logged of the others.
    logger: {
      error: (code) => code !== "JWT_SESSION_ERROR" && console.error(`next-auth: ${code}`),
      warn: () => {},
      debug: () => {},
    },
  }
}

interface SignedIn extends User {
  session_token: string
}

function provider(
  id: string,
  credentials: Record<string, object>,
  open: (fields: Fields, headers: Headers) => Promise<OpenedSession | undefined>,
) {
  return Credentials({
    id,
    name: id,
    credentials,
    async authorize(fields, request): Promise<SignedIn | null> {
      try {
        const opened = await open(fields as Fields, request.headers as Headers)
        return opened ? { id: opened.person.id, session_token: opened.token } : null
      } catch (error) {
        // next-auth hands the message of an error on to the page, which asks for the code of the second factor.
        if (error instanceof TarnwrightError) {
          throw new Error(error.code === "second_factor_required" ? error.code : error.detail)
        }
        console.error("next-auth:", error)
        throw new Error("Something failed on our side.")
      }
    },
  })
}

function valid<Schema extends z.ZodType>(schema: Schema, given: unknown): z.output<Schema> {
  const parsed = schema.safeParse(given)
  if (parsed.success) return parsed.data
  throw new TarnwrightError("validation_failed", parsed.error.issues[0]?.message ?? "This is not valid.")
}

function cookie(name: string) {
  return { name, options: { httpOnly: true, sameSite: "lax" as const, path: "/", secure: isSecure() } }
}
