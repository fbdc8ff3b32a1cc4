import { lookup } from "node:dns/promises"
import { isIP } from "node:net"
import ipaddr from "ipaddr.js"

/** Whether webhooks may go to this machine, over http and to any port: local runs and tests. */
export interface TargetPolicy {
  readonly allowLoopback: boolean
}

/** Every address of a host name. */
export type Resolve = (host: string) => Promise<readonly string[]>

const longestUrl = 2_000
const ports = new Set(["", "443", "8443"])

/**
 * What is wrong with a URL as the target of webhooks; undefined when nothing is. Says nothing of where its name leads:
 * that is asked at each attempt.
 *
 * @source PLATFORM 6.3
 */
export function urlProblem(text: string, { allowLoopback }: TargetPolicy): string | undefined {
  const url = URL.canParse(text) ? new URL(text) : undefined
  if (!url || text.length > longestUrl) {
    return `Send a whole URL of at most ${longestUrl} characters, as https://shop.example/hooks.`
  }
  if (url.username || url.password) return "Leave user name and password out: the signature says who sends."
  // The URL parser has brought decimal, octal and hexadecimal forms of an IPv4 address to dots by now.
  const host = hostOf(url)
  if (allowLoopback && (url.protocol === "http:" || url.protocol === "https:") && isLoopbackHost(host)) {
    return undefined
  }
  if (url.protocol !== "https:") return "The URL must begin with https://."
  if (isIP(host) !== 0) return "Name a host, not a network address."
  if (!ports.has(url.port)) return "Use port 443 or 8443."
  return undefined
}

/**
 * The addresses to which a webhook for the URL may connect: all that its name has, if each of them is public.
 *
 * @throws TargetRefused when one is not, or when the URL itself is not allowed
 * @throws Error of the resolver when the name has no address
 */
export async function resolveTarget(
  url: URL,
  policy: TargetPolicy,
  resolve: Resolve = systemResolver,
): Promise<readonly string[]> {
  if (urlProblem(url.href, policy)) throw new TargetRefused()
  const host = hostOf(url)
  const addresses = isIP(host) === 0 ? await resolve(host) : [host]
  if (addresses.length === 0 || !addresses.every((address) => isAllowed(address, policy))) {
    throw new TargetRefused()
  }
  return addresses
}

/** The URL, or an address of its name, is not one that a webhook may go to. */
export class TargetRefused extends Error {
  constructor() {
    super("A webhook may not go there")
    this.name = "TargetRefused"
  }
}

// Of IPv6 only what IANA gives out as global unicast counts, so that ranges nobody has named yet are refused as well.
// @source IANA IPv6 Global Unicast Address Assignments: 2000::/3
const globalUnicast = ipaddr.parseCIDR("2000::/3") as [ipaddr.IPv6, number]

/**
 * Whether an address belongs to the public Internet.
 *
 * @source IANA IPv4 and IPv6 Special-Purpose Address Registries: everything in them is refused, also NAT64, 6to4 and
 * Teredo, in which an IPv4 address of any kind can hide
 */
export function isPublicAddress(address: string): boolean {
  if (!ipaddr.isValid(address)) return false
  const parsed = ipaddr.parse(address)
  if (parsed.range() !== "unicast") return false
  return parsed.kind() === "ipv4" || (parsed as ipaddr.IPv6).match(globalUnicast)
}

function isAllowed(address: string, { allowLoopback }: TargetPolicy): boolean {
  return isPublicAddress(address) || (allowLoopback && isLoopback(address))
}

function isLoopbackHost(host: string): boolean {
  return host === "localhost" || isLoopback(host)
}

function isLoopback(address: string): boolean {
  return ipaddr.isValid(address) && ipaddr.parse(address).range() === "loopback"
}

/** The host without the brackets of an IPv6 address. */
function hostOf(url: URL): string {
  return url.hostname.replace(/^\[(.*)\]$/, "$1")
}

async function systemResolver(host: string): Promise<readonly string[]> {
  return (await lookup(host, { all: true })).map(({ address }) => address)
}
