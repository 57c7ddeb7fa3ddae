/** Published values of what heat does to copper and magnets. */
import { type ReferenceRow, rowsOf } from "../row.js";

export const temperatureRows: readonly ReferenceRow[] = [
  ...rowsOf({ source: "IEC 60204-1, annex D, formula with 0.003 93; α20 of IEC 60028", tolerance: 1e-9 }, [
    ["C1 25", "R(25 °C)/R(20 °C)", "1", 1.01965],
    ["C1 40", "R(40 °C)/R(20 °C)", "1", 1.0786],
    ["C1 80", "R(80 °C)/R(20 °C)", "1", 1.2358],
    ["C1 100", "R(100 °C)/R(20 °C)", "1", 1.3144],
    ["C1 120", "R(120 °C)/R(20 °C)", "1", 1.393],
    ["C1 155", "R(155 °C)/R(20 °C)", "1", 1.53055],
    ["C1 at 25", "coefficient referred to 25 °C", "1/K", 0.003854264, 1e-6],
  ]),
  ...rowsOf({ source: "IEC 60034-1, cl. 8.6: (T2 + 235)/(T1 + 235)", tolerance: 6e-4, fromMemory: true }, [
    ["C2 235", "R(100 °C)/R(20 °C) by the resistance method", "1", 1.313725],
  ]),
  ...rowsOf({ source: "NEMA MG 1: (T2 + 234.5)/(T1 + 234.5)", tolerance: 6e-4, fromMemory: true }, [
    ["C2 234.5", "R(100 °C)/R(20 °C) by the resistance method", "1", 1.314342],
  ]),
  ...rowsOf(
    { source: "published magnet grades: bonded neodymium −0.11 %/K, ferrite −0.2 %/K", tolerance: 1e-9, fromMemory: true },
    [
      ["C5 neodymium", "torque constant for +60 K", "1", 0.934],
      ["C5 ferrite", "torque constant for +60 K", "1", 0.88],
    ],
  ),
  // The printed factors are referred to 20 °C; magnets here are referred to the sheet's 25 °C, hence the tolerance.
  ...rowsOf({ source: "ferrite motor 20 to 100 °C, elementary algebra from the two coefficients", tolerance: 4e-3 }, [
    ["C5 hot no-load speed", "over the cold one", "1", 1.190476],
    ["C5 hot stall current", "over the cold one", "1", 0.7608034],
    ["C5 hot stall torque", "over the cold one", "1", 0.6390749],
  ]),
];
