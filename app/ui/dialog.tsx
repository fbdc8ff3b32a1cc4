"use client"

import { Dialog as Radix } from "radix-ui"
import type { ReactNode } from "react"
import { Button } from "./button"
import { CloseMark } from "./marks"

/** A sheet over the page for one act. Escape and a click beside it close it, unless it is `held` open. */
export function Dialog({
  open,
  onClose,
  title,
  lead,
  held = false,
  children,
}: {
  open: boolean
  onClose: () => void
  title: string
  lead?: ReactNode
  held?: boolean
  children: ReactNode
}) {
  const hold = held ? (event: Event) => event.preventDefault() : undefined
  return (
    <Radix.Root open={open} onOpenChange={(next) => !next && onClose()}>
      <Radix.Portal>
        <Radix.Overlay className="fixed inset-0 z-40 bg-[#0e1714]/50" />
        <Radix.Content
          onEscapeKeyDown={hold}
          onPointerDownOutside={hold}
          onInteractOutside={hold}
          aria-describedby={lead ? undefined : ""}
          className="fixed inset-x-0 bottom-0 z-50 max-h-[92dvh] overflow-y-auto border-t border-edge bg-paper p-6 sm:inset-x-auto sm:top-1/2 sm:bottom-auto sm:left-1/2 sm:w-[min(36rem,calc(100vw-3rem))] sm:-translate-1/2 sm:rounded sm:border sm:p-8"
        >
          <div className="flex items-start justify-between gap-6">
            <Radix.Title className="text-xl">{title}</Radix.Title>
            {!held && (
              <Radix.Close asChild>
                <Button look="quiet" small aria-label="Close" className="-mt-1 -mr-2 px-2">
                  <CloseMark />
                </Button>
              </Radix.Close>
            )}
          </div>
          {lead && (
            <Radix.Description asChild>
              <div className="mt-2 text-soft">{lead}</div>
            </Radix.Description>
          )}
          <div className="mt-6">{children}</div>
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  )
}
