"use client"

import { useMutation } from "@tanstack/react-query"
import { ask, detailOf } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { Dialog } from "@/app/ui/dialog"
import { Notice } from "@/app/ui/notice"
import type { Enquiry } from "./enquiries"
import { Facts } from "./enquiry-dialog"

export function EraseDialog({
  path,
  item,
  onDone,
  onClose,
}: {
  path: string
  item: Enquiry
  onDone: () => void
  onClose: () => void
}) {
  const erase = useMutation({
    mutationFn: () => ask("POST", `${path}/${item.id}/erase`, {}),
    onSuccess: () => {
      onDone()
      onClose()
    },
  })
  const goes = [
    item.name && "the name",
    "the e-mail address",
    "the question",
    item.tank && "the tank’s figures",
  ]
  return (
    <Dialog
      open
      onClose={onClose}
      title={`Erase the enquiry of ${item.name ?? item.email}?`}
      lead="It is gone for good, for everybody in your team and for us. You cannot answer it afterwards."
    >
      <div className="space-y-6">
        {erase.error && (
          <Notice severity="danger" live>
            {detailOf(erase.error)}
          </Notice>
        )}
        <Facts
          facts={[
            ["What goes", sentence(goes.filter((part): part is string => Boolean(part)))],
            ["What stays", "that somebody asked, when, through which widget, and the words they agreed to"],
            ["Out of reach", "mails that you have sent to the shopper, and files that were exported before"],
          ]}
        />
        <div className="flex flex-wrap gap-3">
          <Button look="danger" busy={erase.isPending} onClick={() => erase.mutate()}>
            Erase the enquiry
          </Button>
          <Button onClick={onClose}>Keep it</Button>
        </div>
      </div>
    </Dialog>
  )
}

function sentence(parts: readonly string[]): string {
  return new Intl.ListFormat("en").format(parts)
}
