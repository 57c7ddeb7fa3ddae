/** How messages speak of a mechanism's protection. */
import type { Drive } from "../model/drive.js";
import { writeQuantity } from "../units/write.js";

const NOUNS = { breaker: "breaker", fuse: "fuse", ptc: "PTC" } as const;

/** Such as "the breaker (holds 2 A)"; empty without protection. */
export function tellProtector({ protection }: Drive): string {
  if (protection === undefined) return "";
  const held =
    protection.kind === "fuse"
      ? `rated ${writeQuantity(protection.ratingA, "current")}`
      : `holds ${writeQuantity(protection.holdCurrentA, "current")}`;
  return `the ${NOUNS[protection.kind]} (${held})`;
}
