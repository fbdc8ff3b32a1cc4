"use client"

import { zodResolver } from "@hookform/resolvers/zod"
import { useState } from "react"
import { useForm } from "react-hook-form"
import { z } from "zod"
import { ApiProblem, ask, detailOf } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { Dialog } from "@/app/ui/dialog"
import { Choices, FieldError, Input, Select } from "@/app/ui/field"
import { Notice } from "@/app/ui/notice"
import type { ItemAttributes, ItemKind } from "@/lib/catalog"
import type { CurvePoint } from "@/lib/flow/pump-curve"
import { attributeLabel, attributeUnit, type KindInfo, type Part } from "./kind-info"
import { priceText, type Read, readAttribute, readName, readPrice, readSku, readUrl } from "./part-values"
import { PumpEditor } from "./pump-editor"
import { checkPoints, pointsFromTwo } from "./pump-points"

/** A field of text that the reader of its value finds nothing wrong with. */
const readBy = <Value,>(read: (text: string) => Read<Value>) =>
  z.string().superRefine((text, ctx) => {
    const found = read(text)
    if ("problem" in found) ctx.addIssue({ code: "custom", message: found.problem })
  })

const form = z.object({
  kind: z.string(),
  name: readBy(readName),
  sku: readBy(readSku),
  url: readBy(readUrl),
  price: readBy((text) => readPrice(text)),
  method: z.enum(["diffuser", "inline_diffuser"]),
  pump_by: z.enum(["two", "curve"]),
  numbers: z.record(z.string(), z.string()),
})
type Form = z.infer<typeof form>

const pumpNumbers = ["max_flow_l_h", "max_head_m"]

/** A part that is added, or all of one that is there. */
export function PartDialog({
  path,
  kinds,
  part,
  onDone,
  onClose,
}: {
  path: string
  kinds: readonly KindInfo[]
  part: Part | undefined
  onDone: (part: Part) => void
  onClose: () => void
}) {
  const [points, setPoints] = useState<readonly CurvePoint[]>(
    (part?.attributes.pump_curve as readonly CurvePoint[] | undefined) ?? pointsFromTwo(1000, 1.6),
  )
  const { register, handleSubmit, setError, watch, getValues, formState } = useForm<Form>({
    resolver: zodResolver(form),
    defaultValues: {
      kind: part?.kind ?? "filter",
      name: part?.name ?? "",
      sku: part?.sku ?? "",
      url: part?.url ?? "",
      price: priceText(part?.price ?? null),
      method: part?.attributes.method === "inline_diffuser" ? "inline_diffuser" : "diffuser",
      pump_by: part?.attributes.pump_curve ? "curve" : "two",
      numbers: Object.fromEntries(
        Object.entries(part?.attributes ?? {})
          .filter(([, value]) => typeof value === "number")
          .map(([name, value]) => [name, String(value)]),
      ),
    },
  })
  const { errors, isSubmitting } = formState
  const kind = watch("kind") as ItemKind
  const byCurve = kind === "filter" && watch("pump_by") === "curve"
  const shown = kinds
    .find(({ name }) => name === kind)!
    .attributes.filter(({ name }) => !(byCurve && pumpNumbers.includes(name)))

  const submit = handleSubmit(async (values) => {
    const attributes: Record<string, ItemAttributes[string]> = {}
    let wrong = false
    for (const info of shown) {
      const required = info.required || (kind === "filter" && pumpNumbers.includes(info.name))
      const found = readAttribute(values.numbers[info.name] ?? "", { ...info, required })
      if ("problem" in found) {
        wrong = true
        setError(`numbers.${info.name}`, { message: found.problem }, { shouldFocus: true })
      } else if (found.value !== undefined) attributes[info.name] = found.value
    }
    if (byCurve && checkPoints(points).problem) wrong = true
    if (wrong) return
    if (kind === "diffuser") attributes.method = values.method
    if (byCurve) attributes.pump_curve = [...points].sort((a, b) => a.flow_l_h - b.flow_l_h)
    const body = {
      name: usable(readName(values.name)),
      sku: usable(readSku(values.sku)),
      url: usable(readUrl(values.url)),
      price: usable(readPrice(values.price)),
      attributes,
    }
    try {
      onDone(
        part
          ? await ask<Part>("PATCH", `${path}/${part.id}`, body)
          : await ask<Part>("POST", path, { kind, ...body }),
      )
      onClose()
    } catch (error) {
      const found = error instanceof ApiProblem ? (error.problem.errors ?? []) : []
      const rest = found.filter(({ pointer, detail }) => {
        const [, field = "", name] = pointer.split("/")
        if (field === "attributes" && shown.some((info) => info.name === name)) {
          setError(`numbers.${name}`, { message: detail })
        } else if (field === "name" || field === "sku" || field === "url" || field === "price") {
          setError(field, { message: detail }, { shouldFocus: true })
        } else return true
        return false
      })
      if (found.length === 0 || rest.length > 0)
        setError("root", { message: rest[0]?.detail ?? detailOf(error) })
    }
  })

  return (
    <Dialog open onClose={onClose} title={part ? part.name : "Add a part"}>
      <form onSubmit={submit} noValidate className="space-y-5">
        {errors.root && (
          <Notice severity="danger" live>
            {errors.root.message}
          </Notice>
        )}
        <Select
          {...register("kind")}
          label="Kind"
          disabled={part !== undefined}
          hint={part && "A part keeps its kind."}
        >
          {kinds.map(({ name, label }) => (
            <option key={name} value={name}>
              {label}
            </option>
          ))}
        </Select>
        <Input {...register("name")} label="Name" autoComplete="off" error={errors.name?.message} />
        <div className="grid gap-5 sm:grid-cols-2">
          <Input
            {...register("sku")}
            label="SKU"
            hint="Your own number, unique."
            autoComplete="off"
            error={errors.sku?.message}
          />
          <Input
            {...register("price")}
            label="Price"
            hint="As 189.00 USD."
            autoComplete="off"
            error={errors.price?.message}
          />
        </div>
        <Input
          {...register("url")}
          label="Link"
          hint="Its page in your shop."
          inputMode="url"
          autoComplete="off"
          error={errors.url?.message}
        />
        {kind === "diffuser" && (
          <Choices
            {...register("method")}
            legend="Where it stands"
            options={[
              { value: "diffuser", label: "In the tank" },
              { value: "inline_diffuser", label: "In the hose" },
            ]}
          />
        )}
        {kind === "filter" && (
          <Choices
            {...register("pump_by", {
              onChange: () => {
                const { numbers, pump_by } = getValues()
                const [flow, head] = pumpNumbers.map((name) => Number(numbers[name]))
                if (pump_by === "curve" && !part?.attributes.pump_curve && flow && head) {
                  setPoints(pointsFromTwo(flow, head))
                }
              },
            })}
            legend="The pump"
            options={[
              { value: "two", label: "Two numbers", explain: "Greatest flow and head, as the box says." },
              {
                value: "curve",
                label: "A curve",
                explain: "Points of the maker's plot, which says far more.",
              },
            ]}
          />
        )}
        {byCurve && <PumpEditor points={points} onChange={setPoints} />}
        <div className="grid gap-5 sm:grid-cols-2">
          {shown.map((info) => (
            <Input
              key={info.name}
              {...register(`numbers.${info.name}`)}
              label={attributeLabel(info.name)}
              unit={attributeUnit(info)}
              inputMode="decimal"
              autoComplete="off"
              error={errors.numbers?.[info.name]?.message}
            />
          ))}
        </div>
        <FieldError message={byCurve && formState.isSubmitted ? checkPoints(points).problem : undefined} />
        <div className="flex flex-wrap gap-3">
          <Button type="submit" look="primary" busy={isSubmitting}>
            {part ? "Keep the changes" : "Add the part"}
          </Button>
          <Button onClick={onClose}>Cancel</Button>
        </div>
      </form>
    </Dialog>
  )
}

function usable<Value>(read: Read<Value>): Value | undefined {
  return "value" in read ? read.value : undefined
}
