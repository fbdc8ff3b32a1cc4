"use client"

import { Select } from "@/app/ui/field"
import type { BenchUnits } from "./bench-units"

/** In which units the counter reads: chosen once, remembered on this device. */
export function UnitChoice({
  units,
  onChange,
}: {
  units: BenchUnits
  onChange: (units: BenchUnits) => void
}) {
  const label = (text: string) => <span className="block truncate text-sm">{text}</span>
  return (
    <div className="grid grid-cols-[1.3fr_0.9fr_1.1fr] gap-3 pb-4">
      <Select
        label={label("Units")}
        value={units.system}
        onChange={(event) => {
          const system = event.target.value as BenchUnits["system"]
          onChange({ ...units, system, temperature: system === "us" ? "f" : "c" })
        }}
      >
        <option value="metric">Metric</option>
        <option value="us">US</option>
      </Select>
      <Select
        label={label("Warmth")}
        value={units.temperature}
        onChange={(event) =>
          onChange({ ...units, temperature: event.target.value as BenchUnits["temperature"] })
        }
      >
        <option value="c">°C</option>
        <option value="f">°F</option>
      </Select>
      <Select
        label={label("Hardness")}
        value={units.kh}
        onChange={(event) => onChange({ ...units, kh: event.target.value as BenchUnits["kh"] })}
      >
        <option value="dkh">dKH</option>
        <option value="kh_ppm_caco3">ppm</option>
        <option value="kh_meq_l">meq/L</option>
      </Select>
    </div>
  )
}
