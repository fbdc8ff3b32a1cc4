"use client"

import { Button } from "@/app/ui/button"
import { Dialog } from "@/app/ui/dialog"
import { Notice } from "@/app/ui/notice"
import { minuteOf } from "@/app/ui/time"
import type { Enquiry } from "./enquiries"
import { languageNames, tankFacts } from "./tank-words"

/** One enquiry: the question, where to answer, the tank, and the record of the consent. */
export function EnquiryDialog({
  item,
  widgetName,
  onErase,
  onClose,
}: {
  item: Enquiry
  widgetName: string | undefined
  onErase: (() => void) | undefined
  onClose: () => void
}) {
  const { name, email, message, language, erased_at } = item
  return (
    <Dialog
      open
      onClose={onClose}
      title={erased_at ? "An erased enquiry" : `Enquiry of ${name ?? email}`}
      lead={`${minuteOf(item.created_at)}, in ${languageNames[language]}, through ${widgetName ? `“${widgetName}”` : "a widget that is gone"}`}
    >
      <div className="space-y-6">
        {erased_at ? (
          <Notice title="What the shopper wrote is erased">
            It was erased on {minuteOf(erased_at)}{" "}
            {item.erased_by === "shopper" ? "by the shopper, through the link in their copy" : "by your team"}
            . What is left says that somebody asked, and that they had agreed.
          </Notice>
        ) : (
          <>
            {/* Written by a stranger: text, and never anything else. */}
            <p lang={language} className="border-l-2 border-action py-1 pl-4 break-words whitespace-pre-line">
              {message}
            </p>
            <Facts
              facts={[
                ...(name ? [["Name", name] as const] : []),
                ["E-mail", email ?? ""],
                ...tankFacts(item.tank),
              ]}
            />
          </>
        )}
        <details open={erased_at !== null}>
          <summary className="link text-sm">Record of the consent</summary>
          <div className="mt-3 space-y-3">
            <p lang={language} className="text-sm text-soft">
              “{item.consent_wording}”
            </p>
            <Facts
              facts={[
                ["Agreed", minuteOf(item.consented_at)],
                ["Words", item.consent_version],
                ["Page", item.page_origin],
              ]}
            />
          </div>
        </details>
        <div className="flex flex-wrap gap-3">
          {email && (
            <a
              className="inline-flex min-h-11 items-center rounded border border-action bg-action px-5 font-medium text-on-action hover:border-action-strong hover:bg-action-strong"
              href={`mailto:${encodeURIComponent(email)}`}
            >
              Answer by mail
            </a>
          )}
          {onErase && (
            <Button look="danger" onClick={onErase}>
              Erase …
            </Button>
          )}
        </div>
      </div>
    </Dialog>
  )
}

export function Facts({ facts }: { facts: readonly (readonly [name: string, value: string])[] }) {
  return (
    <dl className="divide-y divide-line border-y border-line text-sm">
      {facts.map(([name, value]) => (
        <div key={name} className="flex gap-4 py-2">
          <dt className="w-28 shrink-0 text-soft">{name}</dt>
          <dd className="min-w-0 break-words">{value}</dd>
        </div>
      ))}
    </dl>
  )
}
