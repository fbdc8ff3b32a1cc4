/** @type {import("next").NextConfig} */
export default {
  poweredByHeader: false,
  reactStrictMode: true,
  // Loaded by Node from node_modules: native code, or a pool that must be one for all bundles of the process.
  serverExternalPackages: ["@node-rs/argon2", "pg", "nodemailer", "pino", "graphile-worker", "@react-pdf/renderer"],
  // `forbidden()` gives a role that may not see a page a real 403.
  experimental: { authInterrupts: true },
  // `npm run check` looks at the types of the whole project; a start need not do it again.
  typescript: { ignoreBuildErrors: true },
  async headers() {
    return [
      { source: "/:path*", headers: securityHeaders },
      { source: "/w/:path*", headers: widgetHeaders("public, max-age=300") },
      // The version and the hash stand in the address; only /w/v1/… changes.
      {
        source: "/w/:version(\\d+\\.\\d+\\.\\d+)/:path*",
        headers: widgetHeaders("public, max-age=31536000, immutable"),
      },
    ]
  },
}

/** Widgets are loaded by pages of every origin; they hold nothing that is anybody's own. */
function widgetHeaders(cacheControl) {
  return [
    { key: "Access-Control-Allow-Origin", value: "*" },
    { key: "Cross-Origin-Resource-Policy", value: "cross-origin" },
    { key: "Cache-Control", value: cacheControl },
  ]
}

// The content security policy carries a nonce for each answer and is set in proxy.ts.
const securityHeaders = [
  { key: "Strict-Transport-Security", value: "max-age=63072000; includeSubDomains" },
  { key: "X-Content-Type-Options", value: "nosniff" },
  { key: "Referrer-Policy", value: "strict-origin" },
  { key: "Cross-Origin-Opener-Policy", value: "same-origin" },
  { key: "Permissions-Policy", value: "camera=(), geolocation=(), microphone=(), payment=(), usb=()" },
]
