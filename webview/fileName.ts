/** A file name from the name of what is shown that every file system takes. */
export function fileNameOf(subject: string, view: string, ending: string): string {
  const base = subject
    .normalize("NFC")
    .replaceAll(/[^\p{L}\p{N}]+/gu, "-")
    .replaceAll(/^-+|-+$/g, "");
  // Cut by code points, so that no letter is cut in two.
  const short = [...base].slice(0, 40).join("");
  return `${short || "unnamed"}-${view}.${ending}`;
}
