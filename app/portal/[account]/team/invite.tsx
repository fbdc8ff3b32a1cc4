"use client"

import { zodResolver } from "@hookform/resolvers/zod"
import { useForm } from "react-hook-form"
import type { z } from "zod"
import { invitationInput } from "@/app/api/portal/schemas"
import { ask, showProblem } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { Dialog } from "@/app/ui/dialog"
import { Input } from "@/app/ui/field"
import { Notice } from "@/app/ui/notice"
import { RoleChoices } from "./role-choices"

export function InviteDialog({
  path,
  onDone,
  onClose,
}: {
  path: string
  onDone: () => void
  onClose: () => void
}) {
  const { register, handleSubmit, setError, formState } = useForm<z.infer<typeof invitationInput>>({
    resolver: zodResolver(invitationInput),
    defaultValues: { email: "", role: "viewer" },
  })
  const { errors, isSubmitting } = formState

  const submit = handleSubmit(async (values) => {
    try {
      await ask("POST", `${path}/invitations`, values)
      onDone()
    } catch (error) {
      showProblem(error, setError, ["email", "role"])
    }
  })

  return (
    <Dialog
      open
      onClose={onClose}
      title="Invite someone"
      lead="They get a link by mail. It works once, within 72 hours, and only for this address."
    >
      <form onSubmit={submit} noValidate className="space-y-6">
        {errors.root && (
          <Notice severity="danger" live>
            {errors.root.message}
          </Notice>
        )}
        <Input
          {...register("email")}
          label="E-mail"
          type="email"
          autoComplete="off"
          error={errors.email?.message}
        />
        <RoleChoices {...register("role")} error={errors.role?.message} />
        <div className="flex flex-wrap gap-3">
          <Button type="submit" look="primary" busy={isSubmitting}>
            Send the invitation
          </Button>
          <Button onClick={onClose}>Cancel</Button>
        </div>
      </form>
    </Dialog>
  )
}
