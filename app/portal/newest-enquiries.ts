import type { Ctx } from "@/lib/context"
import { type Enquiry, listEnquiries } from "@/lib/enquiries"
import { MOST_SHOWN } from "./[account]/enquiries/most-shown"

/** The enquiries that the page shows. */
export function newestEnquiries({ ctx }: { ctx: Ctx }): Promise<Enquiry[]> {
  return listEnquiries({ ctx, input: { limit: MOST_SHOWN } })
}
