import { notFound } from "next/navigation"
import { showWithdrawal } from "@/lib/enquiries"
import { TarnwrightError } from "@/lib/errors"
import { isLanguage, words } from "../words"
import { WithdrawForm } from "./form"

/** Where the link in a shopper's copy leads: takes their enquiry back, in their language. */
export default async function WithdrawPage({ params }: { params: Promise<{ token: string }> }) {
  const { token } = await params
  const withdrawal = await showWithdrawal({ token: decodeURIComponent(token), now: new Date() }).catch(
    (error) => {
      if (error instanceof TarnwrightError && error.code === "not_found") notFound()
      throw error
    },
  )
  const language = isLanguage(withdrawal.language) ? withdrawal.language : "en"
  const { title, lead, gone } = words[language]
  const day = new Intl.DateTimeFormat(language, { dateStyle: "long", timeZone: "UTC" })
  return (
    <div lang={language}>
      <h1 className="text-2xl">{title(withdrawal.shop_name)}</h1>
      {withdrawal.erased_at ? (
        <p className="mt-4">{gone(withdrawal.shop_name)}</p>
      ) : (
        <>
          <p className="mt-4 text-soft">{lead(withdrawal.shop_name, day.format(withdrawal.created_at))}</p>
          <WithdrawForm token={decodeURIComponent(token)} shop={withdrawal.shop_name} language={language} />
        </>
      )}
    </div>
  )
}
