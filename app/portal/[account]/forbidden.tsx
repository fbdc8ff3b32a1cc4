import { PageHead } from "@/app/ui/sheet"

export default function ForbiddenPage() {
  return (
    <PageHead
      title="Not for your role"
      lead="You belong to this account, but this page is for another role. The pages you may use are in the menu; an owner of the account can change your role."
    />
  )
}
