import type { Caution } from "@/lib/chemistry/answer"
import { Notice } from "./notice"

const order = { danger: 0, warning: 1, info: 2 }

/** What must be known beside a result, gravest first. What only explains is one click away. */
export function Cautions({ cautions }: { cautions: readonly Caution[] }) {
  const sorted = [...cautions].sort((a, b) => order[a.severity] - order[b.severity])
  const grave = sorted.filter(({ severity }) => severity === "danger")
  const others = sorted.filter(({ severity }) => severity !== "danger")
  const shown = grave.length > 0 ? grave : others.splice(0, 2)
  return (
    <div className="space-y-4">
      {shown.map(({ code, severity, message }) => (
        <Notice key={code} severity={severity}>
          {message}
        </Notice>
      ))}
      {others.length > 0 && (
        <details>
          <summary className="link text-sm">{others.length} more to know</summary>
          <div className="mt-4 space-y-4">
            {others.map(({ code, severity, message }) => (
              <Notice key={code} severity={severity}>
                {message}
              </Notice>
            ))}
          </div>
        </details>
      )}
    </div>
  )
}
