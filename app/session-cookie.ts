import { env } from "@/lib/env"

/** Whether the public address is encrypted; only a local run is not. */
export function isSecure(): boolean {
  return env().PUBLIC_URL.startsWith("https:")
}

/** Name of a cookie of ours: bound to the host where the address is encrypted, since only then a browser takes it. */
export function cookieName(name: string): string {
  return isSecure() ? `__Host-${name}` : name
}

/** Holds the random id of the session, and nothing about it. */
export function sessionCookieName(): string {
  return cookieName("tarn-session")
}
