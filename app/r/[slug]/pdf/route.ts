import { refuse } from "@/app/api/portal/answer"
import { pdfAnswer } from "@/app/report/pdf/answer"
import { newId } from "@/lib/id"
import { readSharedReport } from "@/lib/reports"

/** The shared report as a PDF, for whoever has its address. */
export async function GET(_: Request, { params }: { params: Promise<{ slug: string }> }): Promise<Response> {
  try {
    return await pdfAnswer(await readSharedReport((await params).slug))
  } catch (error) {
    return refuse(error, newId("request"))
  }
}
