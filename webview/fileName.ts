/** A file name from a mechanism's name that every file system takes. */
export function fileNameOf(mechanism: string, ending: string): string {
  const base = mechanism
    .normalize("NFC")
    .replaceAll(/[^\p{L}\p{N}]+/gu, "-")
    .replaceAll(/^-+|-+$/g, "");
  // Cut by code points, so that no letter is cut in two.
  const short = [...base].slice(0, 40).join("");
  return `${short || "mechanism"}-operating-point.${ending}`;
}
