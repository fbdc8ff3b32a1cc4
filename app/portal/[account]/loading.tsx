import { Loading } from "@/app/ui/states"

export default function LoadingPage() {
  return <Loading label="Loading" rows={6} />
}
