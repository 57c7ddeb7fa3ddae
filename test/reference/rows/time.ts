/** Published values of what happens in time: protection, heating, travel, flywheels, batteries. */
import { type ReferenceRow, rowsOf } from "../row.js";

const REPLICA = "IEC 60255-149, t = τ·ln((I² − Ip²)/(I² − Iθ²)); formula as printed in relay manuals, numbers derived";
const TWO_NODES = "two-node winding and housing model of thermal motor catalogues; numbers derived, closed form = Runge-Kutta";
const KHURMI = "R. S. Khurmi, Theory of Machines, ex. 16.1 and 16.2, pp. 573 and 574";
const DERIVED = "elementary algebra, no outside print needed";

/** Multiples of the held current, trip time over τ from cold and from 0.9 of the held current. */
export const REPLICA_TIMES: readonly (readonly [multiple: number, cold: number, hot: number])[] = [
  [1.05, 2.375473, 1.048602],
  [1.1, 1.751268, 0.644357],
  [1.2, 1.185624, 0.3589451],
  [1.5, 0.5877867, 0.1414996],
  [2, 0.2876821, 0.06140863],
  [3, 0.117783, 0.02347236],
  [5, 0.04082199, 0.007885494],
  [6, 0.02817088, 0.00541389],
  [7.2, 0.01947861, 0.003730249],
  [8, 0.01574836, 0.003011334],
  [10, 0.01005034, 0.001917353],
];

/** Seconds, winding and housing rise at a constant 20 W. */
export const TWO_NODE_RISES: readonly (readonly [timeS: number, windingK: number, housingK: number])[] = [
  [10, 12.7442, 0.3595435],
  [30, 20.19212, 1.931818],
  [60, 23.61901, 4.518078],
  [300, 39.46001, 19.94849],
  [600, 49.93649, 30.17582],
];

export const timeRows: readonly ReferenceRow[] = [
  ...rowsOf(
    { source: REPLICA, tolerance: 1e-6 },
    REPLICA_TIMES.flatMap(([multiple, cold, hot]) => [
      [`D1 cold ${multiple}`, `trip time at ${multiple} times the held current, cold`, "τ", cold] as const,
      [`D1 hot ${multiple}`, `the same after 0.9 of the held current`, "τ", hot] as const,
    ]),
  ),
  ...rowsOf({ source: REPLICA, tolerance: 1e-6 }, [["D1 half", "twice the held current after half of it", "τ", 0.2231436]]),
  ...rowsOf({ source: "IEC 60947-4-1, table 2, class 10 at 7.2 times the setting; derived", tolerance: 1e-3 }, [
    ["D4 class 10", "τ that opens in 10 s at 7.2 times the setting", "s", 513.4],
  ]),
  ...rowsOf(
    { source: TWO_NODES, tolerance: 1e-6 },
    TWO_NODE_RISES.flatMap(([timeS, winding, housing]) => [
      [`C10 winding ${timeS} s`, "winding's rise at 20 W", "K", winding] as const,
      [`C10 housing ${timeS} s`, "housing's rise at 20 W", "K", housing] as const,
    ]),
  ),
  ...rowsOf({ source: TWO_NODES, tolerance: 1e-6 }, [
    ["C10 fast", "shorter time constant", "s", 9.512774],
    ["C10 slow", "longer time constant", "s", 420.4872],
    ["C10 feedback winding", "steady winding at 10 A, R20 0.1 ohm, ambient 25 °C", "°C", 59.67804],
    ["C10 feedback housing", "steady housing", "°C", 48.11869],
    ["C10 feedback heat", "steady copper heat", "W", 11.55935],
    ["C10 runaway", "current above which there is no steady state", "A", 29.12347],
  ]),
  ...rowsOf(
    { source: "heating-curve identification, Nagrath and Kothari, Electric Machines", tolerance: 1e-4, fromMemory: true },
    [
      ["C6 30 min", "rise after 30 min of a curve to 40 K with τ 43.28085 min", "K", 20],
      ["C6 60 min", "rise after 60 min", "K", 30],
    ],
  ),
  ...rowsOf({ source: `first-order lag; ${DERIVED}`, tolerance: 1e-6 }, [
    ["F12 travel", "10 rad with steady speed 100 rad/s and τ 0.1 s", "s", 0.1841406],
    ["F12 τ", "speed after τ over the steady one", "1", 0.6321206],
    ["F12 95", "time to 95 % of the steady speed", "τ", 2.995732],
    ["F12 98", "time to 98 % of the steady speed", "τ", 3.912023],
  ]),
  ...rowsOf({ source: "Univ. Michigan Control Tutorials, DC Motor Speed: gain of J 0.01, b 0.1, K 0.01, R 1", tolerance: 1e-5 }, [
    ["F11 gain", "steady speed at 1 V", "rad/s", 0.0999001],
  ]),
  ...rowsOf({ source: KHURMI, tolerance: 1e-5 }, [
    ["F5 slowest", "6.5 t, radius of gyration 1.8 m, 56 kJ given up from 121.0103 rpm", "rpm", 118.9897],
    ["F5 time", "2500 kg, radius of gyration 1 m, 1500 N·m: time to 6 rad/s", "s", 10],
  ]),
  ...rowsOf({ source: DERIVED, tolerance: 1e-6 }, [["F5 release", "0.005 kg·m² gives up 20 J at 3000 rpm", "rpm", 2875.846]]),
  ...rowsOf({ source: "Peukert's law referred to the rated discharge, encyclopedia", tolerance: 1e-6, fromMemory: true }, [
    ["G1 time", "100 A·h over 20 h, exponent 1.2, at 10 A", "h", 8.705506],
    ["G1 charge", "charge given", "A·h", 87.05506],
  ]),
  ...rowsOf({ source: "electrotechnik.net, Peukert's law 2010/01: capacity at 1 A", tolerance: 1e-6 }, [
    ["G1 at 1 A", "100 A·h at 1 A, exponent 1.2, at 5 A", "h", 14.49559],
  ]),
];
