import { levelAfter } from "@/lib/numeric/first-order"
import { gasDensity, STANDARD_ATMOSPHERE_PA } from "./carbon-dioxide"

/** A room as one well-mixed volume of air at 1 atm. CO2 sinks: near the floor and in a cabinet it is far more. */
export interface RoomAir {
  readonly room_volume_m3: number
  readonly air_changes_per_h: number
  readonly room_c: number
  readonly background_ppm: number
}

/** Volume of a mass of CO2 at 1 atm, m³; 0.553 m³/kg at 25 °C, real gas. */
export function gasVolume(p: { readonly mass_g: number; readonly room_c: number }): number {
  return p.mass_g / 1000 / gasDensity({ pressure_pa: STANDARD_ATMOSPHERE_PA, temperature_c: p.room_c })
}

/** CO2 in the room, ppm, after a sudden release that pushes air out while it mixes. Mass balance; exact for that. */
export function peakAfterRelease(room: RoomAir, mass_g: number): number {
  const kept = Math.exp(-gasVolume({ mass_g, room_c: room.room_c }) / room.room_volume_m3)
  return 1e6 - (1e6 - room.background_ppm) * kept
}

/** Mean over a time after the peak, ppm: what an exposure limit over 8 h is compared with. */
export function meanAfterRelease(room: RoomAir, peak_ppm: number, hours: number): number {
  const changes = room.air_changes_per_h * hours
  const share = changes === 0 ? 1 : -Math.expm1(-changes) / changes
  return room.background_ppm + (peak_ppm - room.background_ppm) * share
}

/** Hours until the room is back at a level; 0 if it never was above it, `null` if ventilation cannot bring it there. */
export function hoursAbove(room: RoomAir, peak_ppm: number, level_ppm: number): number | null {
  if (peak_ppm <= level_ppm) return 0
  if (room.air_changes_per_h === 0 || room.background_ppm >= level_ppm) return null
  const ratio = (peak_ppm - room.background_ppm) / (level_ppm - room.background_ppm)
  const hours = Math.log(ratio) / room.air_changes_per_h
  return Number.isFinite(hours) ? hours : null
}

/** What a steady leak leads to, ppm. It is 1e6 in a room without any ventilation. */
export function steadyLeakLevel(room: RoomAir, leak_g_h: number): number {
  const leak_m3_h = gasVolume({ mass_g: leak_g_h, room_c: room.room_c })
  const air_m3_h = room.air_changes_per_h * room.room_volume_m3
  if (leak_m3_h === 0) return room.background_ppm
  return (leak_m3_h * 1e6 + air_m3_h * room.background_ppm) / (leak_m3_h + air_m3_h)
}

/** CO2 some hours after a steady leak began, ppm. */
export function leakLevelAfter(room: RoomAir, leak_g_h: number, hours: number): number {
  const leak_m3_h = gasVolume({ mass_g: leak_g_h, room_c: room.room_c })
  return levelAfter({
    start: room.background_ppm,
    limit: steadyLeakLevel(room, leak_g_h),
    k: room.air_changes_per_h + leak_m3_h / room.room_volume_m3,
    time: hours,
  })
}
