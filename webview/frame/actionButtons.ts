/** Buttons for what a sheet offers to write into the code; kept from sheet to sheet, so that the keyboard stays where it is. */
import { element, setShown, setText } from "../page/element.js";
import type { SheetAction } from "./sheet.js";

export interface ActionButtons {
  readonly element: HTMLElement;
  show(actions: readonly SheetAction[]): void;
}

export function createActionButtons(onPress: (action: SheetAction) => void): ActionButtons {
  const box = element("div", { class: "writes", attributes: { role: "group", "aria-label": "Write to the code" } });
  const buttons: HTMLButtonElement[] = [];
  let shown: readonly SheetAction[] = [];
  const buttonAt = (index: number): HTMLButtonElement => {
    const known = buttons[index];
    if (known !== undefined) return known;
    const button = element("button", { attributes: { type: "button" } });
    button.addEventListener("click", () => {
      const action = shown[index];
      if (action !== undefined) onPress(action);
    });
    buttons.push(button);
    box.append(button);
    return button;
  };
  return {
    element: box,
    show(actions) {
      shown = actions;
      setShown(box, actions.length > 0);
      for (const [index, { words }] of actions.entries()) setText(buttonAt(index), words);
      for (const [index, button] of buttons.entries()) setShown(button, index < actions.length);
    },
  };
}
