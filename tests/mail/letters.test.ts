import { describe, expect, it } from "vitest"
import { languages, type Mail, renderMail } from "@/lib/mail"

const url = "http://127.0.0.1:3000/verify?token=abc&from=mail"

/** One mail of each letter, with text that people typed where people may type. */
const mails: Mail[] = [
  { template: "verify_email", to: "a@shop.test", data: { name: "<b>Ada</b>", url } },
  { template: "already_signed_up", to: "a@shop.test", data: { name: "<b>Ada</b>", sign_in_url: url } },
  { template: "reset_password", to: "a@shop.test", data: { name: "<b>Ada</b>", url } },
  { template: "password_changed", to: "a@shop.test", data: { name: "<b>Ada</b>", reset_url: url } },
  {
    template: "invitation",
    to: "a@shop.test",
    data: { inviter_name: "<b>Ada</b>", account_name: "<b>Shop</b>", role: "viewer", url },
  },
  { template: "sign_in_link", to: "a@shop.test", data: { name: "<b>Ada</b>", url } },
  {
    template: "second_factor_changed",
    to: "a@shop.test",
    data: { name: "<b>Ada</b>", what: "recovery_code_used", codes_left: 1, reset_url: url },
  },
  {
    template: "export_ready",
    to: "a@shop.test",
    data: { name: "<b>Ada</b>", account_name: "<b>Shop</b>", days: 7, url },
  },
  {
    template: "account_closing",
    to: "a@shop.test",
    data: { account_name: "<b>Shop</b>", deleted_on: "2027-01-01T00:00:00Z", settings_url: url },
  },
  {
    template: "key_revoked",
    to: "a@shop.test",
    data: {
      account_name: "<b>Shop</b>",
      key_name: "<b>k</b>",
      last4: "a1b2",
      revoked_by: "<b>Ada</b>",
      reason: "<b>leaked</b>",
      keys_url: url,
    },
  },
  {
    template: "key_expiring",
    to: "a@shop.test",
    data: {
      account_name: "<b>Shop</b>",
      key_name: "<b>k</b>",
      last4: "a1b2",
      expires_at: "2027-01-01T00:00:00Z",
      rotated: false,
      keys_url: url,
    },
  },
  {
    template: "webhook_disabled",
    to: "a@shop.test",
    data: { account_name: "<b>Shop</b>", url: "https://shop.test/hooks?<b>", webhooks_url: url },
  },
  {
    template: "enquiry_received",
    to: "a@shop.test",
    data: { account_name: "<b>Shop</b>", widget_name: "<b>w</b>", enquiry_url: url },
  },
  ...languages.map(
    (language): Mail => ({
      template: "enquiry_copy",
      to: "a@shopper.test",
      data: {
        language,
        shop_name: "<b>Shop</b>",
        name: "<b>Ebba</b>",
        message: "<b>Two</b>\nlines",
        tank: { volume_l: 180, ph: 6.8, kh_dkh: 4, temperature_c: 25 },
        withdraw_url: url,
      },
    }),
  ),
  {
    template: "usage_threshold",
    to: "a@shop.test",
    data: {
      account_name: "<b>Shop</b>",
      percent: 80,
      units: 800,
      unit_cap: 1000,
      period_end: "2027-01-01T00:00:00Z",
      usage_url: url,
    },
  },
]

describe.each(mails)("the letter $template", (mail) => {
  const { subject, text, html } = renderMail(mail)

  it("shows what people typed as text, never as HTML", () => {
    expect(html).toContain("&lt;b&gt;")
    expect(html).not.toContain("<b>")
  })

  it("carries its link unbroken in both forms", () => {
    expect(text.split("\n")).toContain(url)
    expect(html).toContain(`href="${url.replace("&", "&amp;")}"`)
  })

  it("says in the foot why it came", () => {
    expect(text).toMatch(/\n--\nTarnwright\. .+[.。]\n$/)
    expect(subject).not.toBe("")
  })
})

describe("a subject", () => {
  it("stays one line when a name holds a line break, so that no header can be smuggled in", () => {
    const { subject } = renderMail({
      template: "invitation",
      to: "a@shop.test",
      data: { inviter_name: "Ada", account_name: "Shop\r\nBcc: all@shop.test", role: "viewer", url },
    })
    expect(subject).toBe("Join Shop Bcc: all@shop.test on Tarnwright")
  })
})
