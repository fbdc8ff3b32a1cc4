import type { Addresses } from "../stack/stack"

/** What the start command prints when everything is up: addresses, sign-ins, a first call. */
export function greeting({ appUrl, mailUrl, stripeFakeUrl, shopUrl, demo, dataDir }: Addresses): string {
  const width = Math.max(...demo.people.map(({ email }) => email.length))
  const people = demo.people.map(({ email, does }) => `    ${email.padEnd(width)}  ${does}`)
  return `
  Tarnwright is up. Ctrl-C ends it.

  Portal           ${appUrl}
  API              ${appUrl}/api/v1
  Shop page        ${shopUrl}   (a retailer's page with a widget, of another origin)
  Caught mail      ${mailUrl}
  Stripe stand-in  ${stripeFakeUrl}
  Data and logs    ${dataDir}

  Sign in with the password ${demo.password} as
${people.join("\n")}

  A first call:
  curl -sS ${appUrl}/api/v1/carbonate/co2 -H "Authorization: Bearer ${demo.sandboxKey}" -H "Content-Type: application/json" -d '{"ph":6.8,"kh_dkh":4}'

`
}
