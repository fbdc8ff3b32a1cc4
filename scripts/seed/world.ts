import type { Role } from "@/db"

/** The demo world is invented: shops, people and addresses exist nowhere (`.test` is reserved, RFC 2606). */
export interface DemoAccount {
  slug: string
  name: string
  plan: string
  people: { email: string; name: string; role: Role }[]
}

export const accounts: DemoAccount[] = [
  {
    slug: "fernhollow",
    name: "Fernhollow Aquatics",
    plan: "brand",
    people: [
      { email: "maren@fernhollow.test", name: "Maren Solvik", role: "owner" },
      { email: "ilya@fernhollow.test", name: "Ilya Brandreth", role: "developer" },
      { email: "sunniva@fernhollow.test", name: "Sunniva Dacre", role: "merchandiser" },
      { email: "tobin@fernhollow.test", name: "Tobin Ashgrove", role: "viewer" },
    ],
  },
  {
    slug: "quillback",
    name: "Quillback Gasworks",
    plan: "nano",
    people: [
      { email: "pell@quillback.test", name: "Pell Marchbank", role: "owner" },
      { email: "odile@quillback.test", name: "Odile Renwick", role: "developer" },
    ],
  },
]

/** The platform's own admin, who belongs to no account. */
export const admin = { email: "admin@tarnwright.test", name: "Wren Tarrant" }
