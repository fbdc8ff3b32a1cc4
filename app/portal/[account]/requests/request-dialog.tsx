import Link from "next/link"
import { errorWords } from "@/app/(site)/docs/errors/words"
import { Button } from "@/app/ui/button"
import { Dialog } from "@/app/ui/dialog"
import { minuteOf } from "@/app/ui/time"
import type { Logged } from "./requests"

/** One call: what it was, and where it was refused, why and how to mend it. */
export function RequestDialog({
  call,
  keyName,
  onClose,
}: {
  call: Logged
  keyName: string | undefined
  onClose: () => void
}) {
  const { at, what, status, calls, units, code, detail, errors, key_id, mode, request_id } = call
  const facts = [
    ["When", minuteOf(at)],
    ["Request", request_id],
    ["Key", `${keyName ?? key_id}, ${mode}`],
    ["Status", String(status)],
    ["Units", calls > 1 ? `${units} for ${calls} calls of a batch` : String(units)],
  ]
  const words = code ? errorWords[code] : undefined
  return (
    <Dialog open onClose={onClose} title={what} lead={detail ?? undefined}>
      {words && (
        <div className="mb-6 space-y-3">
          {errors.length > 0 && (
            <ul className="space-y-1.5">
              {errors.map(({ pointer, detail }) => (
                <li key={`${pointer} ${detail}`}>
                  {pointer && <code className="mr-2 text-sm">{pointer}</code>}
                  {detail}
                </li>
              ))}
            </ul>
          )}
          <p>
            <span className="font-semibold">Why: </span>
            {words.why}
          </p>
          <p>
            <span className="font-semibold">What to do: </span>
            {words.mend}{" "}
            <Link className="link" href={`/docs/errors/${code}`}>
              More on {code}
            </Link>
          </p>
        </div>
      )}
      <dl className="text-sm">
        {facts.map(([name, value]) => (
          <div key={name} className="grid grid-cols-[6rem_minmax(0,1fr)] gap-4 border-t border-line py-1.5">
            <dt className="text-soft">{name}</dt>
            <dd className="font-mono break-all">{value}</dd>
          </div>
        ))}
      </dl>
      <Button className="mt-6" onClick={onClose}>
        Close
      </Button>
    </Dialog>
  )
}
