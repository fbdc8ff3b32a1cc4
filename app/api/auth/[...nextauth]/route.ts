import type { NextRequest } from "next/server"
import NextAuth from "next-auth"
import { authOptions } from "../options"

type Context = { params: Promise<{ nextauth: string[] }> }

const handle = (request: NextRequest, context: Context) => NextAuth(request, context as never, authOptions())

export { handle as GET, handle as POST }
