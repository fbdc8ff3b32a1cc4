import { z } from "zod"
import { defineCalculation } from "@/lib/api/define-calculation"
import { figure, figureOrNull, quantity } from "@/lib/api/quantity"
import { gasDefaults } from "@/lib/gas/defaults"
import { roomSafety } from "@/lib/gas/room-safety"

export const gasRoomSafety = defineCalculation({
  id: "gasRoomSafety",
  path: "/gas/room-safety",
  tag: "Gas",
  summary: "What the whole cylinder would do to the air of the room",
  description:
    "A well-mixed room. CO2 is heavier than air: in cabinets, cellars and near the floor it can be far more.",
  units: 1,
  request: z.strictObject({
    cylinder_mass_g: quantity("cylinder_mass_g"),
    room_volume_m3: quantity("room_volume_m3").optional(),
    room_length_m: quantity("room_length_m").optional(),
    room_width_m: quantity("room_width_m").optional(),
    room_height_m: quantity("room_height_m").optional(),
    air_changes_per_h: quantity("air_changes_per_h").default(gasDefaults.air_changes_per_h),
    room_c: quantity("room_c").default(gasDefaults.room_c),
    background_ppm: quantity("background_ppm").default(gasDefaults.background_ppm),
    leak_g_h: quantity("leak_g_h").optional(),
    daily_use_g_day: quantity("daily_use_g_day").optional(),
  }),
  result: {
    peak_ppm: figure("peak_ppm"),
    hours_above_5000_ppm: figureOrNull("hours_above_5000_ppm"),
    verdict: z.enum(["ok", "ventilate", "leave", "life_danger"]),
    mean_8h_ppm: figure("mean_8h_ppm"),
    gas_m3: figure("gas_m3"),
    room_volume_m3: figure("room_volume_m3"),
    leak_steady_ppm: figureOrNull("leak_steady_ppm"),
    dosing_ppm: figureOrNull("dosing_ppm"),
  },
  uncertainty: {
    hours_above_low_h: figureOrNull("hours_above_5000_ppm"),
    hours_above_high_h: figureOrNull("hours_above_5000_ppm"),
  },
  example: { cylinder_mass_g: 2000, room_volume_m3: 30 },
  run: roomSafety,
})
