import { parseArgs } from "node:util"
import { closePools } from "@/db"
import { accountIdOfKey, accountIdOfSlug } from "@/lib/accounts"
import { scopes as knownScopes } from "@/lib/api/define-operation"
import type { Ctx } from "@/lib/context"
import { TarnwrightError } from "@/lib/errors"
import { createKey, listKeys, revokeKey } from "@/lib/keys"
import { loadLocalEnv } from "./stack/local-env"

const usage = `Keys of an account, for scripts. Needs a running database (npm start).

  npm run keys -- create --account SLUG --kind server|browser --mode live|sandbox --scopes calculate,…
                         [--name NAME] [--origins https://…,…] [--cidrs 192.0.2.0/24,…] [--expires 2027-01-31]
  npm run keys -- list --account SLUG [--json]
  npm run keys -- revoke KEY_ID [--reason TEXT]`

const { positionals, values } = parseArgs({
  allowPositionals: true,
  options: {
    account: { type: "string" },
    kind: { type: "string", default: "server" },
    mode: { type: "string", default: "sandbox" },
    scopes: { type: "string", default: "calculate" },
    name: { type: "string", default: "Made by script" },
    origins: { type: "string" },
    cidrs: { type: "string" },
    expires: { type: "string" },
    reason: { type: "string" },
    json: { type: "boolean", default: false },
  },
})

const commands: Record<string, () => Promise<void>> = { create, list, revoke }

try {
  const command = commands[positionals[0] ?? ""]
  if (!command) throw new TarnwrightError("validation_failed", usage)
  loadLocalEnv()
  await command()
} catch (error) {
  console.error(error instanceof TarnwrightError ? error.detail : error)
  process.exitCode = 1
} finally {
  await closePools()
}

async function create(): Promise<void> {
  const scopes = listed(values.scopes)
  const unknown = scopes.filter((scope) => !(knownScopes as readonly string[]).includes(scope))
  if (unknown.length > 0)
    refuse(`There is no scope ${unknown.join(", ")}. The scopes are ${knownScopes.join(", ")}.`)
  const { secret } = await createKey({
    ctx: operator(await accountIdOfSlug(needed("account"))),
    input: {
      kind: oneOf("kind", ["server", "browser"]),
      mode: oneOf("mode", ["live", "sandbox"]),
      name: values.name,
      scopes,
      origins: listed(values.origins),
      cidrs: listed(values.cidrs),
      expires_at: values.expires ? date(values.expires) : null,
    },
  })
  console.log(secret)
}

async function list(): Promise<void> {
  const keys = await listKeys({ ctx: operator(await accountIdOfSlug(needed("account"))) })
  if (values.json) {
    console.log(JSON.stringify(keys.map(({ account_id, ...key }) => key)))
    return
  }
  for (const { id, kind, mode, last4, name, revoked_at } of keys) {
    console.log(`${id}  ${kind} ${mode}  …${last4}  ${name}${revoked_at ? "  (revoked)" : ""}`)
  }
}

async function revoke(): Promise<void> {
  const key_id = positionals[1] ?? refuse(usage)
  const ctx = operator(await accountIdOfKey(key_id))
  await revokeKey({ ctx, input: { key_id, reason: values.reason ?? "Revoked by the operator's script" } })
  console.log(`${key_id} is revoked.`)
}

function operator(account_id: string): Ctx {
  return { account_id, actor: { kind: "system", id: "scripts/keys" }, now: new Date() }
}

function needed(name: "account"): string {
  return values[name] ?? refuse(`Say --${name}.\n\n${usage}`)
}

function oneOf<Choice extends string>(name: "kind" | "mode", choices: readonly Choice[]): Choice {
  return choices.find((choice) => choice === values[name]) ?? refuse(`--${name} is ${choices.join(" or ")}.`)
}

function listed(text: string | undefined): string[] {
  return (text ?? "")
    .split(",")
    .map((part) => part.trim())
    .filter((part) => part !== "")
}

function date(text: string): Date {
  const parsed = new Date(text)
  return Number.isNaN(parsed.getTime()) ? refuse(`${text} is no date. Write it as 2027-01-31.`) : parsed
}

function refuse(detail: string): never {
  throw new TarnwrightError("validation_failed", detail)
}
