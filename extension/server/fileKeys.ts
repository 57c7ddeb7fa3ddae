/**
 * The one mapping between the protocol's addresses and the analysis' file keys.
 *
 * A `file:` address becomes an absolute path with slashes and a lower-case drive letter; any other address stays an address, decoded.
 * Does not touch a disk, and knows nothing of which files exist.
 */

/** The key of an address. Addresses that mean the same file give the same key. */
export function keyOf(uri: string): string {
  const parts = /^file:\/\/([^/]*)(\/[^?#]*)/i.exec(uri);
  if (parts === null) return decodeAddress(uri);
  const [, host = "", path = ""] = parts;
  const decoded = decode(path);
  if (host !== "") return `//${decode(host).toLowerCase()}${decoded}`;
  const drive = /^\/([a-zA-Z]):(?=\/|$)/.exec(decoded);
  return drive?.[1] === undefined ? decoded : `${drive[1].toLowerCase()}${decoded.slice(2)}`;
}

/** An address of the key. */
export function uriOf(key: string): string {
  if (/^[a-zA-Z]:(\/|$)/.test(key)) return `file:///${encode(key)}`;
  if (key.startsWith("//")) return `file:${encode(key)}`;
  if (key.startsWith("/")) return `file://${encode(key)}`;
  const colon = key.indexOf(":");
  return key.slice(0, colon + 1) + key.slice(colon + 1).replaceAll(/[^/?#%]+/g, encode);
}

/** The key of the folder that holds a file. */
export function folderOf(key: string): string {
  return key.slice(0, key.lastIndexOf("/"));
}

/** The part of a key below a folder, or `undefined` when it lies elsewhere. */
export function pathBelow(folder: string, key: string): string | undefined {
  const prefix = folder.endsWith("/") ? folder : `${folder}/`;
  return key.startsWith(prefix) ? key.slice(prefix.length) : undefined;
}

/** Decoding these (`#`, `%`, `/`, `?`) would change what an address means. */
const KEPT_IN_ADDRESSES = /(%2[35f]|%3f)/i;

function decodeAddress(uri: string): string {
  return uri
    .split(KEPT_IN_ADDRESSES)
    .map((part) => (KEPT_IN_ADDRESSES.test(part) ? part.toUpperCase() : decode(part)))
    .join("");
}

/** A stray `%` is left as it is. */
function decode(text: string): string {
  return text.replaceAll(/(?:%[0-9a-f]{2})+/gi, (codes) => {
    try {
      return decodeURIComponent(codes);
    } catch {
      return codes;
    }
  });
}

function encode(path: string): string {
  return path
    .replaceAll(/\p{Surrogate}/gu, "\ufffd")
    .split("/")
    .map((segment) => encodeURIComponent(segment))
    .join("/");
}
