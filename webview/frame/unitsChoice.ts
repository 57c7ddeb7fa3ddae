/** Which units people read: in axes, read-outs, tables and files of every view. */
import { UNIT_SYSTEMS } from "../../extension/protocol/chartMemory.js";
import type { UnitSystem } from "../../extension/units/systems.js";
import { element } from "../page/element.js";

const WORDS: Readonly<Record<UnitSystem, string>> = {
  metric: "Trade: N·m, rpm",
  si: "SI: N·m, rad/s",
  inch: "Trade: lbf·in, rpm",
};

export function createUnitsChoice(chosen: UnitSystem, onChoose: (system: UnitSystem) => void): { readonly element: HTMLElement } {
  const select = element(
    "select",
    {},
    UNIT_SYSTEMS.map((system) => element("option", { text: WORDS[system], attributes: { value: system } })),
  );
  select.value = chosen;
  select.addEventListener("change", () => {
    const system = UNIT_SYSTEMS.find((one) => one === select.value);
    if (system !== undefined) onChoose(system);
  });
  return { element: element("label", { class: "units" }, [document.createTextNode("Units "), select]) };
}
