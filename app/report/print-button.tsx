"use client"

import { Button } from "@/app/ui/button"

export function PrintButton() {
  return <Button onClick={() => window.print()}>Print</Button>
}
