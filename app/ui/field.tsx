"use client"

import { type ComponentProps, type ReactNode, useId } from "react"
import { classNames } from "./class-names"
import { DownMark } from "./marks"

const control =
  "w-full min-h-11 rounded border border-edge bg-field px-3 text-ink placeholder:text-soft hover:border-ink aria-invalid:border-danger disabled:bg-sunk disabled:text-soft"

interface FrameProps {
  label: ReactNode
  hint?: ReactNode
  error?: string
  className?: string
}

/** Label above, hint and error below, tied to the control for whoever cannot see them. */
function useFrame({ hint, error }: Pick<FrameProps, "hint" | "error">, givenId?: string) {
  const ownId = useId()
  const id = givenId ?? ownId
  const describedBy = [hint && `${id}-hint`, error && `${id}-error`].filter(Boolean).join(" ")
  return {
    id,
    aria: { "aria-invalid": error ? true : undefined, "aria-describedby": describedBy || undefined },
  }
}

function Frame({
  id,
  label,
  hint,
  error,
  className,
  children,
}: FrameProps & { id: string; children: ReactNode }) {
  return (
    <div className={className}>
      <label htmlFor={id} className="block font-medium">
        {label}
      </label>
      <div className="relative mt-1.5">{children}</div>
      {hint && (
        <p id={`${id}-hint`} className="mt-1.5 text-sm text-soft">
          {hint}
        </p>
      )}
      <FieldError id={`${id}-error`} message={error} />
    </div>
  )
}

/** What is wrong with a field or a form and how to mend it. */
export function FieldError({ id, message }: { id?: string; message?: string }) {
  return (
    <p id={id} role={message ? "alert" : undefined} className="mt-1.5 text-sm text-danger empty:mt-0">
      {message}
    </p>
  )
}

type InputProps = ComponentProps<"input"> & FrameProps & { unit?: string; trailing?: ReactNode }

/** A line of text or a number; a quantity carries its `unit` inside the field. */
export function Input({ label, hint, error, unit, trailing, className, id: givenId, ...rest }: InputProps) {
  const { id, aria } = useFrame({ hint, error }, givenId)
  return (
    <Frame {...{ id, label, hint, error, className }}>
      <input
        {...rest}
        {...aria}
        id={id}
        className={classNames(control, unit && "pr-16 font-mono", trailing != null && "pr-20")}
      />
      {unit && (
        <span className="pointer-events-none absolute inset-y-0 right-3 flex items-center font-mono text-sm text-soft">
          {unit}
        </span>
      )}
      {trailing && <span className="absolute inset-y-0 right-1 flex items-center">{trailing}</span>}
    </Frame>
  )
}

/** Several lines of text. */
export function TextArea({
  label,
  hint,
  error,
  className,
  id: givenId,
  ...rest
}: ComponentProps<"textarea"> & FrameProps) {
  const { id, aria } = useFrame({ hint, error }, givenId)
  return (
    <Frame {...{ id, label, hint, error, className }}>
      <textarea rows={3} {...rest} {...aria} id={id} className={`${control} py-2`} />
    </Frame>
  )
}

/** One of a few; the browser's own list, which every phone and reader knows. */
export function Select({
  label,
  hint,
  error,
  className,
  id: givenId,
  children,
  ...rest
}: ComponentProps<"select"> & FrameProps) {
  const { id, aria } = useFrame({ hint, error }, givenId)
  return (
    <Frame {...{ id, label, hint, error, className }}>
      <select {...rest} {...aria} id={id} className={`${control} appearance-none pr-9`}>
        {children}
      </select>
      <DownMark className="pointer-events-none absolute top-1/2 right-3 size-4 -translate-y-1/2 text-soft" />
    </Frame>
  )
}

/** Alternatives that deserve a sentence each. */
export function Choices<Value extends string>({
  legend,
  options,
  error,
  chosen,
  ...rest
}: ComponentProps<"input"> & {
  legend: string
  options: readonly { value: Value; label: string; explain?: string }[]
  error?: string
  /** The one that is chosen, where no form of react-hook-form keeps it. */
  chosen?: Value
}) {
  const id = useId()
  return (
    <fieldset aria-describedby={error ? `${id}-error` : undefined}>
      <legend className="font-medium">{legend}</legend>
      <div className="mt-1.5 divide-y divide-line border-y border-line">
        {options.map(({ value, label, explain }) => (
          <label key={value} className="flex gap-3 py-2.5 hover:bg-sunk">
            <input
              {...rest}
              {...(chosen !== undefined && { checked: chosen === value })}
              type={rest.type ?? "radio"}
              value={value}
              className="mt-1 size-4 shrink-0"
            />
            <span>
              <span className="block">{label}</span>
              {explain && <span className="block text-sm text-soft">{explain}</span>}
            </span>
          </label>
        ))}
      </div>
      <FieldError id={`${id}-error`} message={error} />
    </fieldset>
  )
}
