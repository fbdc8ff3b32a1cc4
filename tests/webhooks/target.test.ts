import { describe, expect, it } from "vitest"
import { isPublicAddress, resolveTarget, TargetRefused, urlProblem } from "@/lib/webhooks/target"

const strict = { allowLoopback: false }
const local = { allowLoopback: true }

describe("the URL of an endpoint", () => {
  it.each([
    "https://shop.example/hooks",
    "https://shop.example:8443/hooks?shop=1",
    "https://shop.example:443/",
    "https://münze.example/hooks",
  ])("may be %s", (url) => {
    expect(urlProblem(url, strict)).toBeUndefined()
  })

  it.each([
    ["no URL", "shop.example/hooks"],
    ["plain http", "http://shop.example/hooks"],
    ["another scheme", "ftp://shop.example/"],
    ["a file", "file:///etc/passwd"],
    ["another port", "https://shop.example:22/"],
    ["a database's port", "https://shop.example:5432/"],
    ["a user name", "https://shop@shop.example/"],
    ["a password", "https://:secret@shop.example/"],
    ["an address", "https://93.184.216.34/"],
    ["loopback", "https://127.0.0.1/"],
    ["loopback in short", "https://127.1/"],
    ["loopback as one decimal number", "https://2130706433/"],
    ["loopback in octal", "https://0177.0.0.1/"],
    ["loopback in hexadecimal", "https://0x7f000001/"],
    ["loopback in full-width digits", "https://１２７.0.0.1/"],
    ["IPv6 loopback", "https://[::1]/"],
    ["IPv4 in IPv6", "https://[::ffff:127.0.0.1]/"],
    ["a cloud's metadata service", "https://169.254.169.254/latest/meta-data/"],
    ["more than 2,000 characters", `https://shop.example/${"x".repeat(2_000)}`],
  ])("may not be %s", (_, url) => {
    expect(urlProblem(url, strict)).toBeTypeOf("string")
  })

  it("may be this machine, on any port, only where the setting says so", () => {
    for (const url of ["http://127.0.0.1:4100/hooks", "http://localhost:4100/", "http://[::1]:4100/"]) {
      expect(urlProblem(url, strict)).toBeTypeOf("string")
      expect(urlProblem(url, local)).toBeUndefined()
    }
    for (const url of [
      "http://10.0.0.1/",
      "https://192.168.0.1/",
      "http://shop.example/",
      "ftp://localhost/",
    ]) {
      expect(urlProblem(url, local)).toBeTypeOf("string")
    }
  })
})

// The blocks of the IANA IPv4 and IPv6 Special-Purpose Address Registries, an address of each (RFC 6890 and what
// followed it), with the blocks that only carry another address inside.
const special = [
  ["0.0.0.1", "this network"],
  ["10.1.2.3", "private use"],
  ["100.64.0.1", "shared address space"],
  ["127.0.0.1", "loopback"],
  ["127.255.255.254", "loopback's end"],
  ["169.254.169.254", "link local, and a cloud's metadata service"],
  ["172.16.0.1", "private use"],
  ["172.31.255.255", "private use's end"],
  ["192.0.0.170", "IETF protocol assignments"],
  ["192.0.2.1", "documentation"],
  ["192.31.196.1", "AS112"],
  ["192.52.193.1", "AMT"],
  ["192.88.99.1", "6to4 relay"],
  ["192.168.1.1", "private use"],
  ["192.175.48.1", "AS112 direct delegation"],
  ["198.18.0.1", "benchmarking"],
  ["198.51.100.1", "documentation"],
  ["203.0.113.1", "documentation"],
  ["224.0.0.1", "multicast"],
  ["240.0.0.1", "reserved"],
  ["255.255.255.255", "broadcast"],
  ["::", "unspecified"],
  ["::1", "loopback"],
  ["::127.0.0.1", "IPv4-compatible"],
  ["::ffff:127.0.0.1", "IPv4-mapped loopback"],
  ["::ffff:8.8.8.8", "IPv4-mapped"],
  ["64:ff9b::7f00:1", "NAT64 of loopback"],
  ["64:ff9b::808:808", "NAT64"],
  ["64:ff9b:1::7f00:1", "local-use NAT64"],
  ["100::1", "discard only"],
  ["2001::1", "Teredo"],
  ["2001:2::1", "benchmarking"],
  ["2001:10::1", "ORCHID"],
  ["2001:20::1", "ORCHIDv2"],
  ["2001:db8::1", "documentation"],
  ["2002:7f00:1::", "6to4 of loopback"],
  ["2002:808:808::", "6to4"],
  ["3fff::1", "documentation"],
  ["4000::1", "not given out"],
  ["5f00::1", "segment routing"],
  ["fc00::1", "unique local"],
  ["fd00:ec2::254", "a cloud's metadata service"],
  ["fe80::1", "link local"],
  ["fec0::1", "site local"],
  ["ff02::1", "multicast"],
  ["not an address", "nothing"],
] as const

describe("an address", () => {
  it.each(special)("is not public where it is %s (%s)", (address) => {
    expect(isPublicAddress(address)).toBe(false)
  })

  it.each([
    "8.8.8.8",
    "93.184.216.34",
    "172.32.0.1",
    "100.128.0.1",
    "2606:4700::1111",
    "2a00:1450:4001::200e",
  ])("is public where it is %s", (address) => {
    expect(isPublicAddress(address)).toBe(true)
  })
})

describe("the addresses of a name", () => {
  const url = new URL("https://shop.example/hooks")

  it("are all given when each is public", async () => {
    const addresses = ["93.184.216.34", "2606:4700::1111"]
    expect(await resolveTarget(url, strict, async () => addresses)).toEqual(addresses)
  })

  it.each(special.slice(0, -1))("are refused when one of them is %s (%s)", async (address) => {
    const resolve = async () => ["93.184.216.34", address]
    await expect(resolveTarget(url, strict, resolve)).rejects.toThrow(TargetRefused)
  })

  it("are refused when there are none", async () => {
    await expect(resolveTarget(url, strict, async () => [])).rejects.toThrow(TargetRefused)
  })

  it("are refused when the system's own resolver leads the name to this machine", async () => {
    await expect(resolveTarget(new URL("https://localhost/"), strict)).rejects.toThrow(TargetRefused)
    expect(await resolveTarget(new URL("https://localhost/"), local)).not.toEqual([])
  })

  it("may not be private even where loopback is allowed", async () => {
    await expect(resolveTarget(url, local, async () => ["10.0.0.1"])).rejects.toThrow(TargetRefused)
  })
})
