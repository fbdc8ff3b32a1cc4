/** The pages of the documentation. */
export const docsMenu = [
  {
    group: "Begin",
    items: [
      { href: "/docs", label: "First call" },
      { href: "/docs/errors", label: "Errors" },
    ],
  },
  { group: "Behind it", items: [{ href: "/docs/science", label: "The science" }] },
] as const
