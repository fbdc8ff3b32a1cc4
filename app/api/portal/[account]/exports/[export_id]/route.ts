import { readExport } from "@/lib/exports"
import { accountEndpoint } from "../../../endpoint"
import { ofExport } from "../../../schemas"

export const GET = accountEndpoint({
  right: "account.manage",
  input: ofExport,
  run: async ({ ctx, input }) => {
    const { archive, finished_at } = await readExport({ ctx, input })
    const name = `tarnwright-${finished_at.toISOString().slice(0, 10)}.zip`
    return new Response(new Uint8Array(archive), {
      headers: {
        "content-type": "application/zip",
        "content-disposition": `attachment; filename="${name}"`,
        "cache-control": "no-store",
      },
    })
  },
})
