import { isOurs, type SubscriptionSnapshot, subscriptionSnapshot } from "./snapshot"
import { stripe } from "./stripe-client"

/** Every subscription to a plan of ours that the customer ever had, as Stripe has it now. */
export async function subscriptionsOf(customer: string): Promise<SubscriptionSnapshot[]> {
  const { data } = await stripe().subscriptions.list({
    customer,
    status: "all",
    limit: 100,
    expand: ["data.schedule"],
  })
  return data.filter(isOurs).map(subscriptionSnapshot)
}
