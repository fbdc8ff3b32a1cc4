import { CautionMark, TickMark } from "@/app/ui/marks"
import type { Verdict } from "@/lib/flow/reactor-criteria"

const tones: Record<Verdict, string> = {
  suitable: "text-action",
  marginal: "text-warning",
  unsuitable: "text-danger",
}

/** What was judged of a reactor: a mark, and always the word. */
export function VerdictWord({ verdict }: { verdict: Verdict }) {
  const Mark = verdict === "suitable" ? TickMark : CautionMark
  return (
    <span className={`inline-flex items-center gap-1.5 font-medium ${tones[verdict]}`}>
      <Mark className="size-3.5" />
      {verdict}
    </span>
  )
}
