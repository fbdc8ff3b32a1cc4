/** How the shop puts the widget on its page. */
export type Embedding = "element" | "framed" | "plain-frame"

interface ProductPage {
  readonly appUrl: string
  readonly widgetId: string
  readonly embedding: Embedding
}

/** How the shop treats personal data: where a widget that takes questions leads to. */
export function privacyPage(): string {
  return `<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<title>Privacy – Fernhollow Aquatics</title>
<link rel="stylesheet" href="/shop.css">
</head>
<body>
<header class="bar"><a class="brand" href="/">Fernhollow <span>Aquatics</span></a></header>
<main>
  <h1>How we treat your data</h1>
  <p>When you ask us something through the calculator, we keep your address, your question and your tank's figures to answer you, for 180 days at most. We pass them to nobody. The link in your copy erases them at once.</p>
</main>
</body>
</html>
`
}

/** The product page of a reactor. Its height for the widget stands in shop.css, since the policy takes no styles here. */
export function productPage({ appUrl, widgetId, embedding }: ProductPage): string {
  return `<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<title>Rill 25 inline reactor – Fernhollow Aquatics</title>
<link rel="stylesheet" href="/shop.css">
${embedding === "plain-frame" ? "" : `<script async type="module" src="${appUrl}/w/v1/loader.js"></script>`}
</head>
<body>
<header class="bar">
  <a class="brand" href="/">Fernhollow <span>Aquatics</span></a>
  <nav aria-label="Departments">
    <a href="/">Plants</a> <a href="/" aria-current="page">Gas and flow</a> <a href="/">Stone and wood</a> <a href="/">Livestock</a>
  </nav>
</header>
<main>
  <section class="product">
    <figure><img src="/reactor.svg" alt="Clear tube with a hose tail at each end and a gas inlet at the top" width="420" height="420"></figure>
    <div>
      <p class="maker">Quillback Gasworks</p>
      <h1>Rill 25 inline reactor</h1>
      <p class="price">64.00 <span>incl. tax, in stock at Millrace Lane and Old Wharf</span></p>
      <p>Dissolves CO2 in the return line of a canister filter, out of sight and without mist in the tank. For 16/22 mm hose and 500 to 1,200 litres an hour.</p>
      <button class="buy" type="button">Put in the basket</button>
      <dl>
        <div><dt>Body</dt><dd>60 × 310 mm, clear acrylic</dd></div>
        <div><dt>Hose</dt><dd>16/22 mm, clamps included</dd></div>
        <div><dt>Warranty</dt><dd>Three years</dd></div>
      </dl>
    </div>
  </section>
  <section class="advice" aria-label="CO2 advice">
    <h2>How much CO2 is in your water now?</h2>
    <p>Before you add a reactor, see where you stand. All you need is your pH, your KH and a thermometer.</p>
    ${widget({ appUrl, widgetId, embedding })}
  </section>
</main>
<footer><p>Fernhollow Aquatics, three shops in one valley: Millrace Lane, Old Wharf, Station Yard.</p></footer>
</body>
</html>
`
}

function widget({ appUrl, widgetId, embedding }: ProductPage): string {
  const fallback = `<a class="fallback" href="/">Bring a water sample: we test it at the counter.</a>`
  if (embedding === "plain-frame") {
    return `<iframe src="${appUrl}/embed/${widgetId}" title="CO2 calculator"></iframe>`
  }
  const mode = embedding === "framed" ? ` mode="iframe" title="CO2 calculator"` : ""
  return `<tarnwright-widget widget-id="${widgetId}"${mode}>${fallback}</tarnwright-widget>`
}
