"use client"

import { zodResolver } from "@hookform/resolvers/zod"
import { useMutation } from "@tanstack/react-query"
import { useForm } from "react-hook-form"
import { z } from "zod"
import { ask, detailOf } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { Input, Select } from "@/app/ui/field"
import type { Json } from "@/app/ui/json"
import { Notice } from "@/app/ui/notice"
import type { ItemMatch } from "@/lib/catalog"

const number = (least: number, most: number, unit: string) =>
  z.string().refine((text) => text.trim() !== "" && Number(text) >= least && Number(text) <= most, {
    message: `Write ${least} to ${most.toLocaleString("en")} ${unit}.`,
  })

const form = z.object({
  volume_l: number(10, 5_000, "L"),
  kh_dkh: number(0.5, 30, "dKH"),
  hose_mm: number(4, 60, "mm"),
  room_m3: number(5, 1_000, "m³"),
  flow_l_h: number(50, 10_000, "L/h"),
  head_m: number(0.2, 6, "m"),
  method: z.enum(["", "diffuser", "inline_diffuser", "inline_reactor"]),
})
type Form = z.infer<typeof form>

const groups = {
  filter: "Filters",
  reactor: "Reactors",
  diffuser: "Diffusers",
  cylinder: "Cylinders",
} as const

/** The shop's own parts for a tank, ranked with the reason and the margin. */
export function TankPanel({ account }: { account: string }) {
  const { register, handleSubmit, formState } = useForm<Form>({
    resolver: zodResolver(form),
    defaultValues: {
      volume_l: "180",
      kh_dkh: "4",
      hose_mm: "16",
      room_m3: "40",
      flow_l_h: "1000",
      head_m: "1.6",
      method: "",
    },
  })
  const { errors } = formState
  const match = useMutation({
    mutationFn: ({ method, ...texts }: Form) =>
      ask<{ matches: Json<ItemMatch>[] }>("POST", `/api/portal/${account}/bench/matches`, {
        volume_l: Number(texts.volume_l),
        kh_dkh: Number(texts.kh_dkh),
        hose: { inner_diameter_mm: Number(texts.hose_mm), length_m: 3 },
        room_volume_m3: Number(texts.room_m3),
        pump: { max_flow_l_h: Number(texts.flow_l_h), max_head_m: Number(texts.head_m) },
        ...(method && { equipment: { method } }),
      }),
  })
  return (
    <div className="space-y-6">
      <form onSubmit={handleSubmit((values) => match.mutate(values))} noValidate className="space-y-5">
        <div className="grid gap-5 sm:grid-cols-2 lg:grid-cols-3">
          <Input
            {...register("volume_l")}
            label="Tank"
            unit="L"
            inputMode="decimal"
            error={errors.volume_l?.message}
          />
          <Input
            {...register("kh_dkh")}
            label="Carbonate hardness"
            unit="dKH"
            inputMode="decimal"
            error={errors.kh_dkh?.message}
          />
          <Select {...register("method")} label="Gas gets in by">
            <option value="">What suits best</option>
            <option value="diffuser">A diffuser in the tank</option>
            <option value="inline_diffuser">A diffuser in the hose</option>
            <option value="inline_reactor">A reactor in the hose</option>
          </Select>
          <Input
            {...register("flow_l_h")}
            label="Present filter: flow"
            unit="L/h"
            inputMode="decimal"
            error={errors.flow_l_h?.message}
          />
          <Input
            {...register("head_m")}
            label="Present filter: head"
            unit="m"
            inputMode="decimal"
            error={errors.head_m?.message}
          />
          <Input
            {...register("hose_mm")}
            label="Hose bore"
            unit="mm"
            inputMode="decimal"
            error={errors.hose_mm?.message}
          />
          <Input
            {...register("room_m3")}
            label="Room"
            unit="m³"
            inputMode="decimal"
            error={errors.room_m3?.message}
          />
        </div>
        <Button type="submit" busy={match.isPending}>
          Show what fits
        </Button>
      </form>
      {match.error && (
        <Notice severity="danger" live>
          {detailOf(match.error)}
        </Notice>
      )}
      <div aria-live="polite" className="space-y-6">
        {match.data && match.data.matches.length === 0 && (
          <p className="text-soft">
            None of the parts fits this tank. Try another method, or add bigger parts.
          </p>
        )}
        {match.data &&
          Object.entries(groups).map(([kind, title]) => {
            const found = match.data.matches.filter((each) => each.kind === kind)
            return (
              found.length > 0 && (
                <section key={kind} aria-label={title}>
                  <h3 className="font-semibold">{title}</h3>
                  <ol className="mt-2 divide-y divide-line border-y border-line">
                    {found.map(({ item_id, name, rank, reason, fit, margin }) => (
                      <li key={item_id} className="py-3">
                        <p className="font-medium">
                          <span className="mr-2 font-mono text-sm text-soft">{rank}</span>
                          {name}
                        </p>
                        <p className="text-sm text-soft">{reason}</p>
                        <p
                          className={`text-sm font-medium ${fit === "good" ? "text-action" : "text-warning"}`}
                        >
                          {fit === "good" ? "fits well" : "fits just"}, {Math.round(100 * margin)} % above the
                          need
                        </p>
                      </li>
                    ))}
                  </ol>
                </section>
              )
            )
          })}
        {match.data?.matches.some(({ kind }) => kind === "cylinder") && (
          <Notice severity="warning" title="Gas under pressure">
            Secure a cylinder upright, keep it cool and the room aired, and have it filled and tested by a
            licensed filler. CO2 kills livestock when it is raised too fast: raise it slowly and watch the
            animals.
          </Notice>
        )}
      </div>
    </div>
  )
}
