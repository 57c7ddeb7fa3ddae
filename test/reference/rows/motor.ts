/** Published values of DC motors at steady running. */
import { type ReferenceRow, rowsOf } from "../row.js";

const MODELICA = "Modelica Standard Library, Electrical.Machines.Examples.DCMachines.DCPM_withLosses, column dcpm1";
const CIPD = "MIT CIPD, Understanding D.C. Motor Characteristics; watts recomputed";
const MAX_EFFICIENCY = "(1 − √(I0/Is))², J. Braun, Formulae Handbook, DC motors; numbers derived";
const CORNELL = "A. Ruina (Cornell), Motor2.m, 2010: equations and inputs; closed form derived";
const FITZGERALD = "Fitzgerald, Kingsley, Umans, Electric Machinery, 6th ed., ex. 7.9, full digits recomputed";
const WILDI = "T. Wildi, Electrical Machines, Drives, and Power Systems, ex. 5-1";
const KOSOW = "I. L. Kosow, Electric Machinery and Transformers, 2nd ed., ex. 1-13";
const HOT_COLD = "Exercise on a PM motor, cold and hot (tutorsglobe.com 5562704); answers derived";
const PRACTICE = "common practice, no source";

export const motorRows: readonly ReferenceRow[] = [
  ...rowsOf({ source: MODELICA, tolerance: 1e-4 }, [
    ["B1 no-load speed", "speed at no load", "rpm", 1500],
    ["B1 torque", "torque at 100 A", "N·m", 63.66],
    ["B1 inner voltage", "back-emf at 100 A", "V", 95],
    ["B1 copper loss", "I²R at 100 A", "W", 500],
    ["B1 output", "shaft power at 100 A", "W", 9500],
    ["B1 stall current", "current at standstill", "A", 2000],
  ]),
  ...rowsOf({ source: CIPD, tolerance: 5e-3 }, [
    ["B3 first speed", "speed of greatest power, motor of 600 rpm and 0.325 N·m", "rpm", 300],
    ["B3 first torque", "its torque", "N·m", 0.163],
    ["B3 first power", "its power", "W", 5.105],
    ["B3 second speed", "speed of greatest power, motor of 3750 rpm and 0.0722 N·m", "rpm", 1875],
    ["B3 second torque", "its torque", "N·m", 0.0361],
    ["B3 second power", "its power", "W", 7.088],
    ["B3 third speed", "speed of greatest power, motor of 92 rpm and 1.6 N·m", "rpm", 46],
    ["B3 third torque", "its torque", "N·m", 0.8],
    ["B3 third power", "its power", "W", 3.854],
  ]),
  ...rowsOf({ source: MAX_EFFICIENCY, tolerance: 1e-7, fromMemory: true }, [
    ["B4 0.01", "best efficiency at I0/Is = 0.01", "1", 0.81],
    ["B4 0.02", "best efficiency at I0/Is = 0.02", "1", 0.7371573],
    ["B4 0.04", "best efficiency at I0/Is = 0.04", "1", 0.64],
    ["B4 0.0625", "best efficiency at I0/Is = 0.0625", "1", 0.5625],
    ["B4 0.10", "best efficiency at I0/Is = 0.10", "1", 0.4675445],
    ["B4 case efficiency", "best efficiency at 12 V, 0.1 ohm, 2 A", "1", 0.7584678],
    ["B4 case current", "its current, seven digits printed", "A", 15.49193, 3e-7],
    ["B4 net peak", "greatest shaft power (V − I0·R)²/4R", "W", 348.1],
    ["B4 net peak current", "its current (Is + I0)/2", "A", 61],
  ]),
  ...rowsOf({ source: CORNELL, tolerance: 1e-6 }, [
    ["B5 efficiency", "best efficiency with viscous friction", "1", 0.7962736],
    ["B5 torque over speed", "T/ω there", "N·m·s", 2.645126e-5],
    // The four below come from a scan and miss the closed form √(P/(c·S)) = 1064.970 rad/s by 2.4e-5.
    ["B5 speed", "speed for 30 W at best efficiency", "rad/s", 1064.996, 3e-5],
    ["B5 torque", "torque for 30 W", "N·m", 0.02816913, 3e-5],
    ["B5 voltage", "voltage for 30 W", "V", 20.78126, 3e-5],
    ["B5 ratio", "ratio to an output of 5 rad/s", "1", 212.9991, 3e-5],
  ]),
  ...rowsOf({ source: FITZGERALD, tolerance: 1e-5, fromMemory: true }, [
    ["B6 constant", "back-emf constant from the no-load test", "V·s/rad", 0.2215096],
    ["B6 back-emf", "at 1700 rpm", "V", 39.43393],
    ["B6 current", "at 48 V and 1700 rpm", "A", 8.31657],
    ["B6 gross power", "back-emf times current", "W", 327.955],
  ]),
  ...rowsOf({ source: WILDI, tolerance: 1e-9, fromMemory: true }, [
    ["B7 starting current", "150 V on 1 ohm", "A", 150],
    ["B7 current at 1000 rpm", "back-emf 100 V", "A", 50],
    ["B7 current at 1460 rpm", "back-emf 146 V", "A", 4],
  ]),
  ...rowsOf({ source: KOSOW, tolerance: 1e-12 }, [["B9 counter-emf", "125 V, 0.25 ohm, 60 A", "V", 110]]),
  ...rowsOf({ source: HOT_COLD, tolerance: 1e-6 }, [
    ["B11 constant", "back-emf constant", "V·s/rad", 0.2652582],
    ["B11 cold current", "at 2 N·m", "A", 7.539822],
    ["B11 cold speed", "at 2 N·m", "rpm", 1257.133],
    ["B11 cold power", "shaft power", "W", 263.2933],
    ["B11 cold efficiency", "shaft over electrical power", "1", 0.6984071],
    ["B11 hot current", "flux ×0.95, resistance ×1.25", "A", 7.936655],
    ["B11 hot speed", "at 2 N·m", "rpm", 1142.843],
    ["B11 hot power", "shaft power", "W", 239.3565],
    ["B11 hot efficiency", "shaft over electrical power", "1", 0.6031672],
  ]),
  // A geared motor at 7.5 V, no load 100 rpm at 0.37 A, stall 15 lbf·in at 4.8 A; tolerances are those of the quoted words.
  ...rowsOf({ source: PRACTICE, tolerance: 0.02 }, [
    ["practice power torque", "torque of greatest output power: about 7.4", "lbf·in", 7.4],
    ["practice power speed", "its speed: about 50", "rpm", 50],
    ["practice efficiency torque", "torque of best efficiency: about 3", "lbf·in", 3, 0.15],
    ["practice efficiency speed", "its speed: about 80", "rpm", 80, 0.05],
    // A loss that scales with speed gives 0.197 A, a constant one 0.37 A: real brushes and grease lose still less when slow.
    ["practice 4 V current", "current of the same motor unloaded at 4 V: about 0.15", "A", 0.15, 0.32],
  ]),
];
