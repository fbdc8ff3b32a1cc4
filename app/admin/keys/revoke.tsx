"use client"

import { zodResolver } from "@hookform/resolvers/zod"
import { useForm } from "react-hook-form"
import { adminRevocationInput } from "@/app/api/admin/schemas"
import { ask, showProblem } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { Dialog } from "@/app/ui/dialog"
import { TextArea } from "@/app/ui/field"
import { Notice } from "@/app/ui/notice"
import type { Found } from "./key-search"

export function RevokeDialog({
  item,
  onClose,
  onDone,
}: {
  item: Found
  onClose: () => void
  onDone: () => void
}) {
  const { register, handleSubmit, setError, formState } = useForm({
    resolver: zodResolver(adminRevocationInput),
    defaultValues: { key_id: item.id, reason: "" },
  })
  const { errors, isSubmitting } = formState

  const submit = handleSubmit(async ({ reason }) => {
    try {
      await ask("POST", `/api/admin/keys/${item.id}/revoke`, { reason })
      onDone()
      onClose()
    } catch (error) {
      showProblem(error, setError, ["reason"])
    }
  })

  return (
    <Dialog
      open
      onClose={onClose}
      title={`Revoke “${item.name}”?`}
      lead={`It belongs to ${item.account_name}. Whatever uses it is refused within two seconds, and it cannot be undone.`}
    >
      <form onSubmit={submit} noValidate className="space-y-6">
        {errors.root && (
          <Notice severity="danger" live>
            {errors.root.message}
          </Notice>
        )}
        <TextArea
          {...register("reason")}
          label="Reason"
          hint="Goes to the owners of the account by mail, and into its audit trail."
          error={errors.reason?.message}
        />
        <div className="flex flex-wrap gap-3">
          <Button type="submit" look="danger" busy={isSubmitting}>
            Revoke the key
          </Button>
          <Button onClick={onClose}>Keep it</Button>
        </div>
      </form>
    </Dialog>
  )
}
