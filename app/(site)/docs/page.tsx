import type { Metadata } from "next"
import Link from "next/link"
import { CodeBlock } from "@/app/ui/code-block"
import { PageHead, Section } from "@/app/ui/sheet"
import { scopes } from "@/lib/api/define-operation"
import { env } from "@/lib/env"
import { languages } from "./first-call"

export const metadata: Metadata = { title: "First call in five minutes" }

export default function FirstCall() {
  const url = env().PUBLIC_URL
  return (
    <>
      <PageHead
        title="First call in five minutes"
        lead="Open an account, make a sandbox key, ask for the CO2 of a water. The sandbox is free and its answers are the real ones."
      />
      <Section title="1. A key" note="Shown once. Keep it where your secrets live.">
        <div className="prose">
          <p>
            <Link href="/signup">Open an account</Link> and confirm your address. In the portal, under Keys,
            choose <strong>New key</strong>, leave it at <em>sandbox</em> and <em>server</em>, and copy it.
          </p>
          <CodeBlock what="In your shell" code={'export TARNWRIGHT_KEY="tarn_server_sandbox_…"'} />
        </div>
      </Section>
      <Section title="2. The call" note="Names end in their unit: kh_dkh, temperature_c, flow_l_h.">
        <div className="space-y-6">
          {languages(url).map(({ name, code }) => (
            <CodeBlock key={name} what={name} code={code} />
          ))}
        </div>
      </Section>
      <Section title="3. The answer" note="Never only a number.">
        <div className="prose">
          <p>
            <code>result</code> holds the numbers, with the 95 % interval beside each that has one.{" "}
            <code>cautions</code> are to be shown wherever the result is: they say when fish or people are at
            risk. <code>assumptions</code> name what you did not say and we took. <code>method</code> names
            the formula, its version and its <Link href="/docs/science">sources</Link>.
          </p>
          <p>
            A refusal is a <code>application/problem+json</code> document (RFC 9457) whose <code>type</code>{" "}
            is the address of a page here: <Link href="/docs/errors">all errors</Link>. A call that fails
            costs nothing.
          </p>
        </div>
      </Section>
      <Section title="Keys" note="Four prefixes, so that a scanner can tell them.">
        <div className="prose">
          <ul>
            <li>
              <code>tarn_server_…</code> is a secret. Send it as <code>Authorization: Bearer</code> from your
              own servers only; from a browser it is refused.
            </li>
            <li>
              <code>tarn_browser_…</code> is public. It can calculate, nothing else, and only on pages of the
              origins that you name. That binds browsers: a script elsewhere can claim any origin, so such
              keys have limits of their own.
            </li>
            <li>
              <code>…_sandbox_…</code> is free, <code>…_live_…</code> counts against your plan.
            </li>
          </ul>
          <p>
            A server key has scopes: {scopes.join(", ")}. Give each the least. Rotating makes a successor
            while the old key goes on for as long as you choose; revoking ends it everywhere within two
            seconds.
          </p>
        </div>
      </Section>
      <Section title="Limits" note="The headers say where you stand.">
        <div className="prose">
          <p>
            <code>RateLimit</code> and <code>RateLimit-Policy</code> count calls a second and units a period.{" "}
            <code>Tarnwright-Units</code> is what the call cost, <code>Tarnwright-Units-Remaining</code> what
            is left. On <Link href="/docs/errors/rate_limited">429</Link> and{" "}
            <Link href="/docs/errors/unavailable">503</Link> wait for <code>Retry-After</code> seconds, then
            try again.
          </p>
        </div>
      </Section>
      <Section title="The document" note="OpenAPI 3.1, made from the operations themselves.">
        <p>
          <a className="link" href="/api/v1/openapi.json">
            openapi.json
          </a>
          . In the portal, the explorer runs every operation of it.
        </p>
      </Section>
    </>
  )
}
