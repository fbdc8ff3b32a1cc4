/** A style sheet as text; `widgets/build.ts` minifies it into the bundle. */
declare module "*.css?text" {
  const text: string
  export default text
}
