"use client"

import Link from "next/link"
import { usePathname } from "next/navigation"
import { useEffect, useState } from "react"
import { Button } from "./button"
import { classNames } from "./class-names"
import { CloseMark, MenuMark } from "./marks"

export interface NavGroup {
  readonly group: string
  readonly items: readonly { readonly href: string; readonly label: string }[]
}

/** The pages of an area at the side of a wide screen, behind a button on a narrow one. */
export function NavLinks({ label, groups }: { label: string; groups: readonly NavGroup[] }) {
  const path = usePathname()
  const [open, setOpen] = useState(false)
  // biome-ignore lint/correctness/useExhaustiveDependencies: going to another page closes the menu
  useEffect(() => setOpen(false), [path])
  const current = groups.flatMap(({ items }) => items).find(({ href }) => href === path)

  return (
    <nav aria-label={label} className="lg:sticky lg:top-6">
      <Button
        className="w-full lg:hidden"
        aria-expanded={open}
        aria-controls="area-menu"
        onClick={() => setOpen(!open)}
      >
        <span className="grow text-left">{current?.label ?? "Pages"}</span>
        {open ? <CloseMark /> : <MenuMark />}
      </Button>
      <div
        id="area-menu"
        className={classNames(
          "border-line lg:block lg:border-0",
          open ? "block border-x border-b px-4 py-2" : "hidden",
        )}
      >
        {groups.map(({ group, items }) => (
          <div key={group} className="py-3 first:lg:pt-0">
            <p className="mb-1 text-sm text-soft">{group}</p>
            <ul>
              {items.map((item) => (
                <li key={item.href}>
                  <Link
                    href={item.href}
                    aria-current={item.href === path ? "page" : undefined}
                    className="flex min-h-9 items-center border-l-2 border-line pl-3 hover:border-edge aria-[current]:border-action aria-[current]:font-semibold"
                  >
                    {item.label}
                  </Link>
                </li>
              ))}
            </ul>
          </div>
        ))}
      </div>
    </nav>
  )
}
