/** Hands the browser a CSV file to keep. */
export function download(fileName: string, csv: string): void {
  const link = document.createElement("a")
  link.href = URL.createObjectURL(new Blob([csv], { type: "text/csv;charset=utf-8" }))
  link.download = fileName
  link.click()
  URL.revokeObjectURL(link.href)
}
