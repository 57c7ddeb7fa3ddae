/** A result that is worked out when it is first asked for, and kept. */
export function once<Result>(make: () => Result): () => Result {
  let made: { readonly result: Result } | undefined;
  return () => {
    made ??= { result: make() };
    return made.result;
  };
}
