/** Published values beside the topics: bands that defaults must lie in, gates of fuses, machines with every loss, energy, wire. */
import { type ReferenceRow, rowsOf } from "../row.js";

const MODELICA = "Modelica Standard Library, Electrical.Machines.Examples.DCMachines.DCPM_withLosses, column dcpm2";
const FUSES = "ISO 8820-3 family, gates as transcribed from makers' blade fuse sheets";
const DERIVED = "elementary algebra, no outside print needed";

export const furtherRows: readonly ReferenceRow[] = [
  ...rowsOf({ source: MODELICA, tolerance: 1e-4 }, [
    ["B2 inner voltage", "100 V and 100 A, 95 °C, brush drop 0.5 V: back-emf", "V", 94.5],
    ["B2 output", "core, stray and friction losses of 350 W: shaft power", "W", 9100],
    ["B2 torque", "at 1417.5 rpm", "N·m", 61.3],
    ["B2 efficiency", "from the supply to the shaft", "1", 0.91],
    ["B2 copper loss", "I²R of the hot winding", "W", 500, 6e-4],
  ]),
  ...rowsOf({ source: "IEC 60034-1, cl. 4, short cycles: 1/√d; derived", tolerance: 5e-3 }, [
    ["C11 15 %", "current of the same heat when held 15 % of the time, over the continuous one", "1", 2.581989],
    ["C11 25 %", "the same, 25 %", "1", 2],
    ["C11 40 %", "the same, 40 %", "1", 1.581139],
    ["C11 60 %", "the same, 60 %", "1", 1.290994],
  ]),
  ...rowsOf({ source: FUSES, tolerance: 1e-9 }, [
    ["D5 40 A 135 % fast", "blade fuse of 40 A at 135 %: least time", "s", 0.75],
    ["D5 40 A 135 % slow", "greatest time", "s", 600],
    ["D5 40 A 200 % fast", "at 200 %: least time", "s", 0.15],
    ["D5 40 A 200 % slow", "greatest time", "s", 5],
    ["D5 40 A 350 % fast", "at 350 %: least time", "s", 0.08],
    ["D5 40 A 350 % slow", "greatest time", "s", 0.5],
    ["D5 40 A 600 % slow", "at 600 %: greatest time", "s", 0.15],
    ["D5 20 A 160 % fast", "blade fuse of 20 A at 160 %: least time", "s", 0.25],
    ["D5 20 A 160 % slow", "greatest time", "s", 50],
    ["D5 20 A 200 % fast", "at 200 %: least time", "s", 0.15],
    ["D5 20 A 200 % slow", "greatest time", "s", 5],
  ]),
  ...rowsOf({ source: FUSES, tolerance: 1e-9, fromMemory: true }, [
    ["D5 20 A 350 % fast", "at 350 %: least time", "s", 0.04],
    ["D5 20 A 600 % slow", "at 600 %: greatest time", "s", 0.1],
  ]),
  // Middles of the published bands; the tolerance is half of their width.
  ...rowsOf({ source: "meadinfo.org 2008/11, gear efficiency: spur 94 to 98 %", tolerance: 0.0201, absolute: true }, [
    ["E10 spur", "efficiency assumed for a spur stage", "1", 0.96],
  ]),
  ...rowsOf({ source: "planetarygeardrive.top: 97 to 98 % per stage", tolerance: 0.0051, absolute: true }, [
    ["E10 planetary", "efficiency assumed for a planetary stage", "1", 0.975],
  ]),
  ...rowsOf({ source: "handbooks: roller chain 97 to 98 %", tolerance: 0.0051, absolute: true, fromMemory: true }, [
    ["E10 chain", "efficiency assumed for a chain", "1", 0.975],
  ]),
  ...rowsOf({ source: "achrnews.com 107928, tip sheet: belts 95 to 98 %", tolerance: 0.0151, absolute: true }, [
    ["E10 belt", "efficiency assumed for a belt", "1", 0.965],
  ]),
  ...rowsOf({ source: "meadinfo.org 2008/11: worm 50 to 90 %", tolerance: 0.2, absolute: true }, [
    ["E10 worm", "efficiency of a worm of 12° lead angle, with the default friction", "1", 0.7],
  ]),
  ...rowsOf({ source: "OpenStax College Physics, sec. 10.4, four rods of 50 kg and 4 m", tolerance: 5e-4 }, [
    ["F4 energy", "energy given up from 300 rpm to standstill", "J", 526_378.9],
  ]),
  ...rowsOf({ source: "R. S. Khurmi, Theory of Machines, ex. 16.2, p. 574", tolerance: 1e-9 }, [
    ["F5 energy", "2500 kg, radius of gyration 1 m, 6 rad/s: energy to standstill", "J", 45_000],
  ]),
  ...rowsOf(
    { source: "sheet of a sealed lead-acid battery, 5 A·h over 20 h, 4.25 A·h over 5 h; exponent derived", tolerance: 1e-4 },
    [["G2 10 h", "time at 0.475 A with the exponent 1.132801", "h", 9.666]],
  ),
  ...rowsOf({ source: `ASTM B258, 5.2107 mohm/m; ${DERIVED}`, tolerance: 2e-4 }, [
    ["G6 loop", "voltage that 2 m of AWG 12 take at 30 A", "V", 0.3127],
  ]),
];
