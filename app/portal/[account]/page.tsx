import Link from "next/link"
import type { OfAccount } from "@/app/page-props"
import { type OpenAccount, openAccountFor } from "@/app/session"
import { ButtonLink } from "@/app/ui/button"
import { Figure, FigureRow } from "@/app/ui/figure"
import { Gauge } from "@/app/ui/gauge"
import { TickMark } from "@/app/ui/marks"
import { PageHead, Section } from "@/app/ui/sheet"
import { minuteOf } from "@/app/ui/time"
import { can } from "@/lib/accounts"
import { planOf } from "@/lib/billing/plans"
import { type KeyRow, listKeys } from "@/lib/keys"
import { quotaOf } from "@/lib/usage"

export default async function Overview({ params }: OfAccount) {
  const opened = await openAccountFor("account.read", params)
  const { account, actor, ctx, person } = opened
  const mayKeys = can(actor, "key.read")
  const mayUsage = can(actor, "usage.read")
  const [live, sandbox, keys] = await Promise.all([
    mayUsage ? quotaOf({ ctx, input: { mode: "live" } }) : undefined,
    mayUsage ? quotaOf({ ctx, input: { mode: "sandbox" } }) : undefined,
    mayKeys ? listKeys({ ctx }) : undefined,
  ])
  const inForce = keys?.filter((key) => worksAt(key, ctx.now))
  return (
    <>
      <PageHead title={`Hello ${person.name.split(" ")[0]}`} lead={leadOf(opened)} />
      {keys && can(actor, "key.create") && (
        <NextStep
          base={`/portal/${account.slug}`}
          keys={keys}
          called={Boolean(live?.used || sandbox?.used)}
          now={ctx.now}
        />
      )}
      {live && sandbox && (
        <Section title="Where you stand" note={`The period ends on ${minuteOf(live.period_end)}.`}>
          <FigureRow>
            <Figure
              label="Live units"
              value={live.used.toLocaleString("en")}
              unit={`of ${live.cap.toLocaleString("en")}`}
              under="this period"
            />
            <Figure
              label="Sandbox units"
              value={sandbox.used.toLocaleString("en")}
              unit={`of ${sandbox.cap.toLocaleString("en")}`}
              under="today, free"
            />
            {inForce && (
              <Figure
                label="Keys in force"
                value={inForce.length}
                unit={inForce.length === 1 ? "key" : "keys"}
                under={lastUse(inForce)}
              />
            )}
          </FigureRow>
          <div className="mt-5">
            <Gauge used={live.used} cap={live.cap} label="Live units used of this period" />
          </div>
          <p className="mt-4">
            <Link className="link" href={`/portal/${account.slug}/usage`}>
              See usage by day
            </Link>
          </p>
        </Section>
      )}
      <Section title="Learn" note="Everything here is also in the API.">
        <ul className="space-y-2">
          <li>
            <Link className="link" href="/docs">
              The first call in five minutes
            </Link>
          </li>
          <li>
            <Link className="link" href="/docs/errors">
              What each error means and how to mend it
            </Link>
          </li>
          <li>
            <Link className="link" href="/docs/science">
              How the numbers are made, and from which sources
            </Link>
          </li>
        </ul>
      </Section>
    </>
  )
}

/** The way from an open account to live answers, with the first step that is still to do put forward. */
function NextStep({
  base,
  keys,
  called,
  now,
}: {
  base: string
  keys: readonly KeyRow[]
  called: boolean
  now: Date
}) {
  const own = keys.filter((key) => worksAt(key, now))
  const steps = [
    {
      done: called || keys.some(({ last_used_at }) => last_used_at !== null),
      title: "Get a first answer",
      text: "The explorer makes a sandbox key by itself: choose an operation and execute it.",
      href: `${base}/explorer`,
      action: "Open the explorer",
    },
    {
      done: own.some(({ expires_at, mode }) => mode === "live" || expires_at === null),
      title: "Make a key of your own",
      text: "A sandbox key for building, with the scopes that your code needs.",
      href: `${base}/keys`,
      action: "Make a key",
    },
    {
      done: own.some(({ mode, last_used_at }) => mode === "live" && last_used_at !== null),
      title: "Go live",
      text: "Swap in a live key: it counts against the units of your plan.",
      href: `${base}/keys`,
      action: "Make a live key",
    },
  ]
  const next = steps.find(({ done }) => !done)
  if (!next) return null
  return (
    <Section title="Next step" note={`${steps.filter(({ done }) => done).length} of ${steps.length} done`}>
      <ol className="space-y-5">
        {steps.map((step, index) => (
          <li key={step.title} className="flex gap-4">
            <span
              className={`flex size-7 shrink-0 items-center justify-center rounded-full border font-mono text-xs ${
                step.done
                  ? "border-action text-action"
                  : step === next
                    ? "border-ink"
                    : "border-edge text-soft"
              }`}
            >
              {step.done ? <TickMark className="size-3.5" /> : index + 1}
              {step.done && <span className="sr-only">Done: </span>}
            </span>
            <div>
              <p className={step === next ? "text-lg font-semibold" : "text-soft"}>{step.title}</p>
              {step === next && (
                <>
                  <p className="mt-1 max-w-measure text-soft">{step.text}</p>
                  <ButtonLink look="primary" href={step.href} className="mt-4">
                    {step.action}
                  </ButtonLink>
                </>
              )}
            </div>
          </li>
        ))}
      </ol>
    </Section>
  )
}

function leadOf({ account, role }: OpenAccount): string {
  const { name, calls_per_s } = planOf(account.plan)
  const place = `${account.name} is on ${name}, ${calls_per_s} calls a second.`
  return role === "viewer" ? `${place} As a viewer you can see usage and invoices.` : place
}

function worksAt({ revoked_at, expires_at }: KeyRow, now: Date): boolean {
  return revoked_at === null && (expires_at === null || expires_at > now)
}

function lastUse(keys: readonly KeyRow[]): string {
  const used = keys.flatMap(({ last_used_at }) => last_used_at ?? [])
  if (used.length === 0) return "none used yet"
  return `last call ${minuteOf(new Date(Math.max(...used.map(Number))))}`
}
