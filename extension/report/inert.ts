/** Text from source files made harmless for a terminal: names can hold anything. */

/** Control and direction characters become a visible escape; over-long text is cut. */
export function toInertText(text: string): string {
  const visible = text.replace(/[\p{Cc}\p{Cf}\p{Zl}\p{Zp}]/gu, (character) => {
    return `\\u${(character.codePointAt(0) ?? 0).toString(16).padStart(4, "0")}`;
  });
  return visible.length <= 400 ? visible : `${visible.slice(0, 399)}…`;
}
