import type { ComponentProps } from "react"
import { roles } from "@/app/api/portal/schemas"
import { Choices } from "@/app/ui/field"
import { does } from "./roles"

const options = roles.map((value) => ({
  value,
  label: value.charAt(0).toUpperCase() + value.slice(1),
  explain: does[value],
}))

export function RoleChoices(props: Omit<ComponentProps<typeof Choices>, "legend" | "options">) {
  return <Choices {...props} legend="Role" options={options} />
}
