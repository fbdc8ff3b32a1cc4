import { mountOf } from "@/widgets/shared/mount"
import { Co2Level } from "./view"

export const mount = mountOf(Co2Level)
