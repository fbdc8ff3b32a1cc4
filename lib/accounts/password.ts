import { hash, verify } from "@node-rs/argon2"
import { TarnwrightError } from "@/lib/errors"

// @source OWASP Password Storage Cheat Sheet: argon2id with 19 MiB, 2 passes, 1 lane at least (PLATFORM 5.1)
const cost = { memoryCost: 19_456, timeCost: 2, parallelism: 1 }
const prefix = "$argon2id$v=19$m=19456,t=2,p=1$"

/** A hash of no password, so that an unknown address costs as much time as a known one. */
const nobody = `${prefix}rvXbCSxe+5HGcHZGxLBRMg$CZ+6pZ+JAyv3oOjcDz0k3sLQTzRSP4kUFHJG1JMDoCk`

// Each hash holds 19 MiB and a core for some 15 ms: more than this at once would be a way to exhaust the server.
const atOnce = 4
const mayWait = 64

let running = 0
const waiting: (() => void)[] = []

/** The argon2id hash of a password in PHC form. */
export function hashPassword(password: string): Promise<string> {
  return inTurn(() => hash(password, cost))
}

/** Whether the password belongs to the hash. Without a hash it takes as long and is never true. */
export async function isPasswordOf(stored: string | null | undefined, password: string): Promise<boolean> {
  const matches = await inTurn(() => verify(stored ?? nobody, password))
  return matches && stored != null
}

/** Whether a hash was made at another cost than today's and should be made again at the next sign-in. */
export function isOutdated(stored: string): boolean {
  return !stored.startsWith(prefix)
}

async function inTurn<T>(work: () => Promise<T>): Promise<T> {
  if (running >= atOnce) {
    if (waiting.length >= mayWait) {
      throw new TarnwrightError(
        "unavailable",
        "Too many people are signing in right now. Try again shortly.",
        {
          retryAfterS: 2,
        },
      )
    }
    await new Promise<void>((resolve) => waiting.push(resolve))
  }
  running++
  try {
    return await work()
  } finally {
    running--
    waiting.shift()?.()
  }
}
