/**
 * The chart's page: the switch between its views, and which of them is asked for, shown and remembered.
 *
 * Knows no view by name: what there is stands in views/table.ts.
 */
import type { ChartAnswer, HostMessage } from "../../extension/protocol/chartMessages.js";
import { VIEW_NAMES, type ViewName } from "../../extension/protocol/charts/views.js";
import type { Host } from "../host.js";
import { element } from "../page/element.js";
import { VIEWS } from "../views/table.js";
import type { View } from "../views/view.js";
import { withSubject, withView } from "./memory.js";
import { createTabs } from "./tabs.js";
import { createUnitsChoice } from "./unitsChoice.js";
import { createViewPage, type ViewPage } from "./viewPage.js";

export interface ChartPage {
  receive(message: HostMessage): void;
  /** Draws again in the colours and for the pixels of now. */
  redraw(): void;
}

export function createChartPage(root: HTMLElement, host: Host): ChartPage {
  const withReader = document.body.classList.contains("vscode-using-screen-reader");
  let memory = host.recall();
  const remember = (next: typeof memory): void => {
    if (next === memory) return;
    memory = next;
    host.remember(memory);
  };

  const system = () => memory.units ?? host.units;
  const pageOf = <V extends ViewName>(view: View<V>): ViewPage<V> =>
    createViewPage(view, {
      host,
      withReader,
      memory: () => memory.views[view.name],
      remember: (change) => remember(withView(memory, view.name, change)),
      tableOpen: () => memory.tableOpen,
      openTable: (open) => remember({ ...memory, tableOpen: open }),
      system,
      ask: () => host.send({ type: "ask", want: want() }),
      write: () => host.send({ type: "writeToCode", want: want() }),
    });
  const pages = new Map(VIEW_NAMES.map((name) => [name, pageOf(VIEWS[name] as View<ViewName>)] as const));
  const want = () => VIEWS[memory.view].want(memory.views[memory.view] as never);

  const choose = (view: ViewName): void => {
    if (view === memory.view) return;
    remember({ ...memory, view });
    showChosen();
    host.send({ type: "ask", want: want() });
  };
  const units = createUnitsChoice(system(), (next) => {
    remember({ ...memory, units: next });
    host.send({ type: "chooseUnits", units: next });
    for (const { update } of pages.values()) update();
  });
  const place = element("div");
  const tabs = createTabs(
    VIEW_NAMES.map((name) => ({ name, title: VIEWS[name].title })),
    choose,
  );
  const showChosen = (): void => {
    tabs.select(memory.view);
    const page = pages.get(memory.view);
    if (page === undefined) return;
    // Only the chosen one is on the page: nothing of the others can be reached, or read by mistake.
    place.replaceChildren(page.panel);
    page.redraw();
  };

  const show = (answer: ChartAnswer): void => {
    if (answer.kind === "chart") {
      const view = VIEWS[answer.view] as View<ViewName>;
      const before = JSON.stringify(want());
      remember(withSubject(memory, answer.view, view.subject(answer)));
      if (answer.view === memory.view && JSON.stringify(want()) !== before) host.send({ type: "ask", want: want() });
    }
    pages.get(answer.view)?.show(answer);
  };

  root.replaceChildren(element("div", { class: "bar" }, [tabs.element, units.element]), place);
  showChosen();
  host.send({ type: "ready", mechanism: memory.mechanism, robot: memory.robot, want: want() });
  return {
    receive(message) {
      if (message.type === "show") show(message.answer);
      else choose(message.view);
    },
    redraw() {
      for (const { redraw } of pages.values()) redraw();
    },
  };
}
