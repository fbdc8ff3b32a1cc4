/** The first call in each language, as whole programs that read the key from the environment. */
export function languages(url: string): readonly { readonly name: string; readonly code: string }[] {
  return [
    {
      name: "curl",
      code: `curl ${url}/api/v1/carbonate/co2 \\
  -H "Authorization: Bearer $TARNWRIGHT_KEY" \\
  -H "Content-Type: application/json" \\
  -d '{"ph": 6.8, "kh_dkh": 4}'`,
    },
    {
      name: "TypeScript",
      code: `const response = await fetch("${url}/api/v1/carbonate/co2", {
  method: "POST",
  headers: {
    authorization: \`Bearer \${process.env.TARNWRIGHT_KEY}\`,
    "content-type": "application/json",
  },
  body: JSON.stringify({ ph: 6.8, kh_dkh: 4 }),
})
const answer = await response.json()
if (!response.ok) throw new Error(answer.detail)
console.log(answer.result.co2_mg_l, answer.cautions)`,
    },
    {
      name: "Python",
      code: `import json, os, urllib.request

request = urllib.request.Request(
    "${url}/api/v1/carbonate/co2",
    data=json.dumps({"ph": 6.8, "kh_dkh": 4}).encode(),
    headers={
        "Authorization": "Bearer " + os.environ["TARNWRIGHT_KEY"],
        "Content-Type": "application/json",
    },
)
with urllib.request.urlopen(request) as response:
    answer = json.load(response)
print(answer["result"]["co2_mg_l"], answer["cautions"])`,
    },
  ]
}
