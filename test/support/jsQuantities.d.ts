/** The part of js-quantities that the tests use; the package brings no types. */
declare module "js-quantities" {
  export default function Qty(text: string): { toBase(): { readonly scalar: number } };
}
