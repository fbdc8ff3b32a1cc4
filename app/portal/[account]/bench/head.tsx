"use client"

import { useState } from "react"
import { Button } from "@/app/ui/button"
import { Dialog } from "@/app/ui/dialog"
import { PageHead } from "@/app/ui/sheet"
import { SaveReport } from "./save-report"
import type { Worked } from "./work-out"

/** The head of the Bench: what is done with the plan as a whole. */
export function BenchHead({
  account,
  worked,
  maySave,
  reportUnits,
  onNew,
}: {
  account: string
  /** Absent while something has to be mended: a sheet in doubt is not handed over. */
  worked: Worked | undefined
  maySave: boolean
  reportUnits: number
  onNew: () => void
}) {
  const [asks, setAsks] = useState(false)
  return (
    <>
      <PageHead
        title="Bench"
        lead="Worked out as you type; only saving is billed."
        actions={
          <>
            <Button onClick={() => setAsks(true)}>New customer</Button>
            <Button disabled={!worked} onClick={() => window.print()}>
              Print
            </Button>
            {maySave && <SaveReport account={account} worked={worked} units={reportUnits} />}
          </>
        }
      />
      <Dialog
        open={asks}
        onClose={() => setAsks(false)}
        title="Begin with a new customer?"
        lead="All that is typed here is cleared. Reports that were saved stay."
      >
        <div className="flex flex-wrap gap-3">
          <Button
            look="primary"
            onClick={() => {
              onNew()
              setAsks(false)
            }}
          >
            Clear the bench
          </Button>
          <Button onClick={() => setAsks(false)}>Keep this tank</Button>
        </div>
      </Dialog>
    </>
  )
}
