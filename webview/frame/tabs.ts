/** The switch between views: one stop of the Tab key, arrows within it, as ARIA's tab pattern asks. */
import type { ViewName } from "../../extension/protocol/charts/views.js";
import { element } from "../page/element.js";

export interface Tab {
  readonly name: ViewName;
  readonly title: string;
}

export interface Tabs {
  readonly element: HTMLElement;
  select(name: ViewName): void;
}

export const tabId = (name: ViewName): string => `tab-${name}`;
export const panelId = (name: ViewName): string => `view-${name}`;

export function createTabs(tabs: readonly Tab[], onChoose: (name: ViewName) => void): Tabs {
  const buttons = new Map(
    tabs.map(({ name, title }) => {
      const attributes = { type: "button", role: "tab", id: tabId(name), "aria-controls": panelId(name) };
      return [name, element("button", { class: "tab", text: title, attributes })] as const;
    }),
  );
  const names = [...buttons.keys()];
  for (const [name, button] of buttons) button.addEventListener("click", () => onChoose(name));
  const list = element("div", { class: "tabs", attributes: { role: "tablist", "aria-label": "Views" } }, [...buttons.values()]);
  list.addEventListener("keydown", (event) => {
    const at = names.findIndex((name) => buttons.get(name) === document.activeElement);
    const next = neighbour(event.key, at, names.length);
    const name = next === undefined ? undefined : names[next];
    if (at < 0 || name === undefined || event.altKey || event.ctrlKey || event.metaKey) return;
    event.preventDefault();
    onChoose(name);
    buttons.get(name)?.focus();
  });
  return {
    element: list,
    select(chosen) {
      for (const [name, button] of buttons) {
        button.setAttribute("aria-selected", String(name === chosen));
        button.tabIndex = name === chosen ? 0 : -1;
      }
    },
  };
}

function neighbour(key: string, at: number, count: number): number | undefined {
  switch (key) {
    case "ArrowRight":
      return (at + 1) % count;
    case "ArrowLeft":
      return (at + count - 1) % count;
    case "Home":
      return 0;
    case "End":
      return count - 1;
    default:
      return undefined;
  }
}
