/** One pack for the whole carrier. */
import { battery } from "loadmark";

export const pack = battery({
  openCircuit: "12.6 V",
  resistance: "110 mohm",
  capacity: "3 A*h",
  mustStayAbove: "9 V",
});
