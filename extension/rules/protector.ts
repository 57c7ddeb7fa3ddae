/** How messages speak of a mechanism's protection. */
import type { Drive, Protection } from "../model/drive.js";
import { writeQuantity } from "../units/write.js";

const NOUNS = { breaker: "breaker", fuse: "fuse", ptc: "PTC" } as const;

/** Such as "the breaker (holds 2 A)"; empty without protection. */
export function tellProtector({ protection }: Drive): string {
  return protection === undefined ? "" : tellProtection(protection);
}

export function tellProtection(protection: Protection): string {
  const held =
    protection.kind === "fuse"
      ? `rated ${writeQuantity(protection.ratingA, "current")}`
      : `holds ${writeQuantity(protection.holdCurrentA, "current")}`;
  return `the ${NOUNS[protection.kind]} (${held})`;
}
