/** Makes elements of the page. Text goes in as text: names come from people's code and may hold markup. */

export interface ElementOptions {
  readonly class?: string;
  readonly text?: string;
  readonly attributes?: Readonly<Record<string, string>>;
}

export function element<K extends keyof HTMLElementTagNameMap>(
  tag: K,
  options: ElementOptions = {},
  children: readonly Node[] = [],
): HTMLElementTagNameMap[K] {
  const made = document.createElement(tag);
  if (options.class !== undefined) made.className = options.class;
  if (options.text !== undefined) made.textContent = options.text;
  for (const [name, value] of Object.entries(options.attributes ?? {})) made.setAttribute(name, value);
  made.append(...children);
  return made;
}

/** Changes a text only if it is another one, so that a reader of the screen is not told again what stayed. */
export function setText(target: HTMLElement, text: string): void {
  if (target.textContent !== text) target.textContent = text;
}

export function setShown(target: HTMLElement, shown: boolean): void {
  target.hidden = !shown;
}
