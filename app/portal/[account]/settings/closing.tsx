"use client"

import { useMutation } from "@tanstack/react-query"
import { useRouter } from "next/navigation"
import { useState } from "react"
import { useForm } from "react-hook-form"
import { ask, detailOf, showProblem } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { Dialog } from "@/app/ui/dialog"
import { Input } from "@/app/ui/field"
import { Notice } from "@/app/ui/notice"

/** Deletes the account after its days of grace, or takes that back. */
export function Closing({
  account,
  name,
  days,
  deletedOn,
}: {
  account: string
  name: string
  days: number
  deletedOn: string | null
}) {
  const router = useRouter()
  const path = `/api/portal/${account}/closing`
  const [asking, setAsking] = useState(false)
  const reopen = useMutation({ mutationFn: () => ask("DELETE", path), onSuccess: () => router.refresh() })

  if (deletedOn) {
    return (
      <div className="space-y-5">
        <Notice severity="danger" title={`Everything is deleted on ${deletedOn}`}>
          Until then the keys and widgets are stopped, and you can still take it back.
        </Notice>
        {reopen.error && (
          <Notice severity="danger" live>
            {detailOf(reopen.error)}
          </Notice>
        )}
        <Button look="primary" busy={reopen.isPending} onClick={() => reopen.mutate()}>
          Keep the account
        </Button>
      </div>
    )
  }
  return (
    <>
      <p className="max-w-measure">
        Every key and widget stops at once. After {days} days the catalogue, the reports, the enquiries, the
        usage and the audit trail are gone for good. Make an archive first if you may need them.
      </p>
      <Button look="danger" className="mt-4" onClick={() => setAsking(true)}>
        Delete the account
      </Button>
      {asking && (
        <CloseDialog
          path={path}
          name={name}
          days={days}
          onClose={() => setAsking(false)}
          onDone={() => {
            setAsking(false)
            router.refresh()
          }}
        />
      )}
    </>
  )
}

function CloseDialog({
  path,
  name,
  days,
  onClose,
  onDone,
}: {
  path: string
  name: string
  days: number
  onClose: () => void
  onDone: () => void
}) {
  const { register, handleSubmit, setError, formState } = useForm({ defaultValues: { name: "" } })
  const { errors, isSubmitting } = formState

  const submit = handleSubmit(async (values) => {
    try {
      await ask("POST", path, values)
      onDone()
    } catch (error) {
      showProblem(error, setError, ["name"])
    }
  })

  return (
    <Dialog
      open
      onClose={onClose}
      title={`Delete ${name}?`}
      lead={`Pages and servers that use its keys and widgets are refused from this moment. A paid plan runs out with its period. Any owner can take it back for ${days} days, and nobody after that.`}
    >
      <form onSubmit={submit} noValidate className="space-y-6">
        {errors.root && (
          <Notice severity="danger" live>
            {errors.root.message}
          </Notice>
        )}
        <Input
          {...register("name", { required: `Write ${name}.` })}
          label="Name of the account"
          hint={`Write “${name}”, so that it is the right one.`}
          autoComplete="off"
          error={errors.name?.message}
        />
        <div className="flex flex-wrap gap-3">
          <Button type="submit" look="danger" busy={isSubmitting}>
            Stop everything and delete it
          </Button>
          <Button onClick={onClose}>Keep it</Button>
        </div>
      </form>
    </Dialog>
  )
}
