import type { Metadata } from "next"
import { ButtonLink } from "@/app/ui/button"
import { Wordmark } from "@/app/ui/wordmark"

export const metadata: Metadata = { title: "Nothing here" }

export default function NotFound() {
  return (
    <main id="main" className="mx-auto max-w-md px-5 py-8">
      <Wordmark />
      <h1 className="mt-12 text-3xl">There is nothing here</h1>
      <p className="mt-3 text-soft">
        The page does not exist, or it belongs to an account that you are not part of. Check the address.
      </p>
      <div className="mt-8 flex flex-wrap gap-3">
        <ButtonLink look="primary" href="/portal">
          Go to the portal
        </ButtonLink>
        <ButtonLink href="/">Home</ButtonLink>
      </div>
    </main>
  )
}
