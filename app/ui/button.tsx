import Link from "next/link"
import type { ComponentProps } from "react"
import { classNames } from "./class-names"

type Look = "primary" | "plain" | "danger" | "quiet"

const looks: Record<Look, string> = {
  primary: "border-action bg-action text-on-action hover:border-action-strong hover:bg-action-strong",
  plain: "border-edge text-ink hover:border-ink",
  danger: "border-danger text-danger hover:bg-danger hover:text-paper",
  quiet: "border-transparent text-soft hover:text-ink hover:bg-sunk",
}

function buttonClass(look: Look, small: boolean, className?: string): string {
  return classNames(
    "inline-flex items-center justify-center gap-2 rounded border font-medium whitespace-nowrap",
    "transition-colors disabled:border-line disabled:bg-sunk disabled:text-soft",
    small ? "min-h-8 px-3 text-sm" : "min-h-11 px-5",
    looks[look],
    className,
  )
}

export type ButtonProps = ComponentProps<"button"> & { look?: Look; small?: boolean; busy?: boolean }

/** A button; while `busy` it keeps its place and its focus, and does nothing. */
export function Button({
  look = "plain",
  small = false,
  busy = false,
  className,
  onClick,
  ...rest
}: ButtonProps) {
  return (
    <button
      type="button"
      {...rest}
      aria-disabled={busy || undefined}
      aria-busy={busy || undefined}
      onClick={busy ? (event) => event.preventDefault() : onClick}
      className={buttonClass(look, small, classNames(busy && "opacity-60", className))}
    />
  )
}

/** A link that looks like a button, for what leads somewhere. */
export function ButtonLink({
  look = "plain",
  small = false,
  className,
  ...rest
}: ComponentProps<typeof Link> & { look?: Look; small?: boolean }) {
  return <Link {...rest} className={buttonClass(look, small, className)} />
}
