"use client"

import { useMutation, useQuery } from "@tanstack/react-query"
import { useState } from "react"
import type { BillingPage } from "@/app/portal/billing-of"
import { ask, detailOf } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { type Column, DataTable } from "@/app/ui/data-table"
import { Figure, FigureRow } from "@/app/ui/figure"
import type { Json } from "@/app/ui/json"
import { usd } from "@/app/ui/money"
import { Notice } from "@/app/ui/notice"
import { PageHead, Section } from "@/app/ui/sheet"
import { Failed } from "@/app/ui/states"
import { Day, dayOf } from "@/app/ui/time"
import { planOf } from "@/lib/billing/plans"
import { PlanChoice } from "./plan-choice"
import { SpendingCap } from "./spending-cap"

export type Answer = Json<BillingPage>

interface Props {
  account: string
  initial: Answer
  mayManage: boolean
  /** How a visit to the checkout ended, where one just did. */
  checkout: "done" | "left" | undefined
}

const waitFor_ms = 60_000

export function Billing({ account, initial, mayManage, checkout }: Props) {
  const path = `/api/portal/${account}/billing`
  const [since] = useState(Date.now)
  const { data, error, refetch, dataUpdatedAt } = useQuery({
    queryKey: [account, "billing"],
    queryFn: () => ask<Answer>("GET", path),
    initialData: initial,
    // A payment is in force when Stripe tells us, which may be a moment after it sends the person back.
    refetchInterval: ({ state }) =>
      checkout === "done" && !state.data?.subscription && Date.now() - since < waitFor_ms ? 1_000 : false,
  })
  const leave = useMutation({
    mutationFn: ({ to, plan }: { to: "checkout" | "manage"; plan?: string }) =>
      ask<{ url: string }>("POST", `${path}/${to}`, plan ? { plan } : {}),
    onSuccess: ({ url }) => location.assign(url),
  })
  const plan = planOf(data.plan)
  const { subscription } = data
  const busy = leave.isPending || leave.isSuccess

  return (
    <>
      <PageHead
        title="Billing"
        lead={
          mayManage
            ? "What the account costs and how far it may go."
            : "An owner of the account can change this."
        }
        actions={
          mayManage &&
          subscription && (
            <Button look="primary" busy={busy} onClick={() => leave.mutate({ to: "manage" })}>
              Card, plan and cancellation
            </Button>
          )
        }
      />
      <div className="space-y-4 pb-8 empty:hidden">
        {error && <Failed detail={detailOf(error)} onRetry={refetch} />}
        {leave.error && (
          <Notice severity="danger" live>
            {detailOf(leave.error)}
          </Notice>
        )}
        {checkout === "done" && (
          <CheckoutDone
            active={subscription !== null}
            plan={plan.name}
            late={dataUpdatedAt - since > waitFor_ms - 2_000}
          />
        )}
        {checkout === "left" && !subscription && (
          <Notice>You left the checkout. Nothing was charged, and everything is as it was.</Notice>
        )}
        {subscription?.owed && (
          <Notice severity="danger" title="A payment is owed">
            The card was declined on {dayOf(subscription.owed.since)}. Until{" "}
            {dayOf(subscription.owed.full_until)} everything works as before; then the account falls back to{" "}
            {planOf("nano").name}.
          </Notice>
        )}
        {subscription?.cancel_at_period_end && (
          <Notice severity="warning" title="The subscription ends">
            On {dayOf(subscription.current_period_end)} the account goes back to {planOf("nano").name}.
          </Notice>
        )}
      </div>
      <Section
        title="Plan"
        note={subscription ? `The period runs until ${dayOf(subscription.current_period_end)}.` : undefined}
      >
        <FigureRow>
          <Figure label="Plan" value={<span className="font-sans">{plan.name}</span>} />
          <Figure
            label="Price"
            value={usd(plan.price_minor)}
            unit="a month"
            under={!subscription && plan.price_minor > 0 ? "given without a subscription" : undefined}
          />
          <Figure
            label="Units a period"
            value={data.unit_cap.toLocaleString("en")}
            under={
              data.unit_cap > plan.included_units
                ? `${plan.included_units.toLocaleString("en")} included`
                : "all included"
            }
          />
        </FigureRow>
      </Section>
      {mayManage && !subscription && data.plan === "nano" && (
        <Section title="More units" note="You pay on a page of Stripe; we never see the card.">
          <PlanChoice busy={busy} onChoose={(chosen) => leave.mutate({ to: "checkout", plan: chosen })} />
        </Section>
      )}
      {mayManage && data.can_allow_overage && plan.overage_minor_per_1000 !== null && (
        <Section
          title="Beyond the plan"
          note="The account never spends more than you allow here, and stops when it is reached."
        >
          <SpendingCap path={path} plan={plan} cap_minor={data.overage_cap_minor} onSaved={refetch} />
        </Section>
      )}
      <Section title="Invoices">
        <DataTable
          caption="Invoices"
          columns={invoiceColumns}
          rows={data.invoices}
          fileName={`${account}-invoices`}
          empty={
            plan.price_minor === 0
              ? `No invoice yet: ${plan.name} costs nothing.`
              : "No invoice yet. The first one comes with the first payment."
          }
          sortedBy={{ id: "issued", desc: true }}
        />
      </Section>
    </>
  )
}

function CheckoutDone({ active, plan, late }: { active: boolean; plan: string; late: boolean }) {
  if (active) {
    return (
      <Notice live title={`${plan} is in force`}>
        Thank you. The new quota counts from now; your keys stay the same.
      </Notice>
    )
  }
  return (
    <Notice severity={late ? "warning" : "info"} live title="Your payment is being confirmed">
      {late
        ? "It takes longer than usual. The plan changes by itself as soon as the confirmation is here; you need not pay again."
        : "This takes a few seconds. You can leave the page."}
    </Notice>
  )
}

const invoiceColumns: readonly Column<Answer["invoices"][number]>[] = [
  { id: "number", header: "Number", value: ({ number }) => number ?? "draft" },
  {
    id: "issued",
    header: "Issued",
    value: ({ issued_at }) => issued_at,
    cell: ({ issued_at }) => <Day at={issued_at} />,
  },
  {
    id: "amount",
    header: "Amount, USD",
    numeric: true,
    value: ({ amount_minor }) => amount_minor / 100,
    cell: ({ amount_minor }) => (amount_minor / 100).toFixed(2),
  },
  { id: "status", header: "Status", value: ({ status }) => status },
  {
    id: "link",
    header: "Document",
    value: ({ hosted_url }) => hosted_url ?? "",
    cell: ({ hosted_url, number }) =>
      hosted_url && (
        <a className="link" href={hosted_url}>
          Open<span className="sr-only"> invoice {number}</span>
        </a>
      ),
  },
]
