"use client"

import Link from "next/link"
import { signOut } from "next-auth/react"
import { DropdownMenu } from "radix-ui"
import { DownMark } from "./marks"

const item = "flex min-h-9 items-center px-4 py-1.5 outline-none data-[highlighted]:bg-sunk"

/** Who is signed in, where else they may go, and the way out. */
export function PersonMenu({
  name,
  email,
  links,
}: {
  name: string
  email: string
  links: readonly { href: string; label: string }[]
}) {
  async function leave() {
    await signOut({ redirect: false })
    location.assign("/")
  }

  return (
    <DropdownMenu.Root>
      <DropdownMenu.Trigger className="inline-flex min-h-9 max-w-48 items-center gap-2 text-sm hover:text-action">
        <span className="truncate">{name}</span>
        <DownMark className="size-3" />
      </DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content
          align="end"
          sideOffset={8}
          className="z-40 max-w-[calc(100vw-2rem)] min-w-56 rounded border border-edge bg-paper py-2 text-sm"
        >
          <DropdownMenu.Label className="truncate px-4 py-1.5 text-soft">{email}</DropdownMenu.Label>
          <DropdownMenu.Separator className="my-2 border-t border-line" />
          <DropdownMenu.Item asChild>
            <Link href="/person" className={item}>
              Your sign-in
            </Link>
          </DropdownMenu.Item>
          {links.map(({ href, label }) => (
            <DropdownMenu.Item key={href} asChild>
              <Link href={href} className={item}>
                {label}
              </Link>
            </DropdownMenu.Item>
          ))}
          <DropdownMenu.Separator className="my-2 border-t border-line" />
          <DropdownMenu.Item onSelect={leave} className={`${item} cursor-pointer`}>
            Sign out
          </DropdownMenu.Item>
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  )
}
