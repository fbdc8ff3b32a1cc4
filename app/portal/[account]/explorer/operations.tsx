"use client"

// The parser of OpenAPI documents registers its refractors as a side effect of these modules, which Turbopack drops
// unless they are imported by their own paths; without them "Execute" throws.
import "../../../../node_modules/@swagger-api/apidom-ns-openapi-2/src/refractor/registration.mjs"
import "../../../../node_modules/@swagger-api/apidom-ns-openapi-3-0/src/refractor/registration.mjs"
import "../../../../node_modules/@swagger-api/apidom-ns-openapi-3-1/src/refractor/registration.mjs"
import type { ReactNode } from "react"
import SwaggerUI from "swagger-ui-react"
import "swagger-ui-react/swagger-ui.css"
import "./operations.css"

interface System {
  preauthorizeApiKey(scheme: string, key: string): void
}

/** Code as plain text: the highlighter writes colours into the elements, of which half are too faint to read. */
function PlainCode({ children }: { children?: ReactNode }) {
  return <pre className="microlight">{children}</pre>
}

const toPlainCode = () => PlainCode
const plainCode = () => ({ wrapComponents: { SyntaxHighlighter: toPlainCode } })

/** Our own document, ready to execute with the key. */
export default function Operations({ secret }: { secret: string }) {
  return (
    <div id="api">
      <SwaggerUI
        url="/api/v1/openapi.json"
        docExpansion="list"
        defaultModelsExpandDepth={-1}
        defaultModelExpandDepth={2}
        displayRequestDuration
        tryItOutEnabled
        plugins={[plainCode]}
        onComplete={(system: System) => system.preauthorizeApiKey("key", secret)}
      />
    </div>
  )
}
