/** The page's end of the wire: the editor's functions for this page, with every message checked. Keeps them to itself. */

import { type ChartMemory, chartMemorySchema, NO_MEMORY, UNIT_SYSTEMS } from "../extension/protocol/chartMemory.js";
import { type HostMessage, hostMessageSchema, type PageMessage } from "../extension/protocol/chartMessages.js";
import { readMessage } from "../extension/protocol/readMessage.js";
import type { UnitSystem } from "../extension/units/systems.js";

interface EditorApi {
  postMessage(message: unknown): void;
  getState(): unknown;
  setState(state: unknown): void;
}

declare function acquireVsCodeApi(): EditorApi;

export interface Host {
  send(message: PageMessage): void;
  /** What was remembered; nothing where it cannot be read. */
  recall(): ChartMemory;
  remember(memory: ChartMemory): void;
  /** Chosen in an earlier chart. */
  readonly units: UnitSystem;
  listen(onMessage: (message: HostMessage) => void): void;
}

/** To be called once: the editor hands its functions out once. */
export function connectHost(): Host {
  const api = acquireVsCodeApi();
  const send = (message: PageMessage): void => api.postMessage(message);
  return {
    send,
    units: UNIT_SYSTEMS.find((system) => system === document.body.dataset.units) ?? "metric",
    recall: () => readMessage(chartMemorySchema, api.getState()) ?? NO_MEMORY,
    remember: (memory) => api.setState(memory),
    listen(onMessage) {
      window.addEventListener("message", ({ data }: MessageEvent<unknown>) => {
        const message = readMessage(hostMessageSchema, data);
        if (message !== undefined) onMessage(message);
        else send({ type: "trouble", what: "The chart's page got a message that it does not know, and ignored it." });
      });
    },
  };
}
