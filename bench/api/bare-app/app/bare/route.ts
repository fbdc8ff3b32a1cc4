// What the App Router costs by itself: a JSON body parsed, as many bytes as a real answer returned, nothing else.
const answer = JSON.stringify({ filler: "x".repeat(Number(process.env.ANSWER_BYTES ?? 3500) - 13) })

export async function POST(request: Request): Promise<Response> {
  await request.json()
  return new Response(answer, { headers: { "content-type": "application/json" } })
}
