/** Further published values, found in textbooks, course pages and worked exercises of mechanics and electricity. */
import { type ReferenceRow, rowsOf } from "../row.js";

export const foundRows: readonly ReferenceRow[] = [
  // The print rounds the lead angle to 3.39°, which moves the torque by 0.3 %.
  ...rowsOf({ source: "R. L. Mott, Machine Elements in Mechanical Design, 4th ed., ex. 17-1, p. 703", tolerance: 3.5e-3 }, [
    ["Mott raising", "Acme screw, 12 500 lbf, 1.3429 in, 4 threads/in, f 0.15: torque to raise", "lbf·in", 1809],
    ["Mott efficiency", "its efficiency, F·l/(2π·1809)", "1", 0.27492],
  ]),
  ...rowsOf({ source: "R. L. Mott, Machine Elements in Mechanical Design, 4th ed., p. 343", tolerance: 1e-3 }, [
    ["Mott wormgear", "three starts, 52 teeth, 1750 rpm: gear's speed", "rpm", 101],
  ]),
  ...rowsOf({ source: "adaptivebooks.org, Statics 5.6.1, problem 2", tolerance: 1e-3 }, [
    ["statics jack", "10 000 lbf, 2 threads/in, 2 in, f 0.2: torque to raise", "lbf·in", 2840],
  ]),
  ...rowsOf({ source: "engineeringprep.com, problem 516", tolerance: 1e-3 }, [
    ["prep screw", "20 kN, lead 10 mm, efficiency 0.7", "N·m", 45.5],
  ]),
  ...rowsOf({ source: "physicsforums.com 381286: 80 ohm at 20 °C, 100 ohm hot, 1/234.5 per K from 0 °C", tolerance: 1e-3 }, [
    ["forum winding", "R(83.63 °C)/R(20 °C)", "1", 1.25],
  ]),
  ...rowsOf(
    {
      source: "R. Knight, Physics for Scientists and Engineers, ch. 9 problem 37, as worked at answerprime.com; g = 9.8",
      tolerance: 1e-9,
    },
    [
      ["Knight lift power", "1000 kg raised 100 m in 50 s", "W", 19_600],
      ["Knight lift work", "work done", "J", 980_000],
    ],
  ),
  ...rowsOf({ source: "qammunity.org 3970457: 45.0 kW lift 35.0 m in 20.0 s; g = 9.80", tolerance: 1e-5 }, [
    ["elevator power", "2623.91 kg raised 35 m in 20 s", "W", 45_000],
  ]),
  ...rowsOf({ source: "homeworksource.com 1085336: coil of 13 ohm on 120 V", tolerance: 2e-3 }, [
    ["coil at rest", "current when turned on", "A", 9.23],
    ["coil at speed", "current at a back-emf of 66 V", "A", 4.15],
  ]),
  ...rowsOf({ source: "toughstem.com 703: 115 V, 21.5 A at first, 6.5 A at speed", tolerance: 1e-3 }, [
    ["household motor", "back-emf at speed", "V", 80.23],
  ]),
  ...rowsOf({ source: "qammunity.org 11328014: 120 V, 7 A, 0.720 ohm", tolerance: 1e-3 }, [
    ["series back-emf", "back-emf at 7 A", "V", 114.96],
    ["series start", "starting current", "A", 166.7],
    ["series resistor", "starting current behind 7.28 ohm more", "A", 15],
  ]),
  ...rowsOf({ source: "clutchprep.com 144846: toy motor, 6.00 V, 4.50 V at 3.00 A", tolerance: 1e-9 }, [
    ["toy start", "starting current", "A", 12],
  ]),
  ...rowsOf({ source: "physicsforums.com 221704: 5.5 V, 1.9 A at speed, 8.6 A locked", tolerance: 1e-3 }, [
    ["starter motor", "back-emf at speed", "V", 4.285],
  ]),
  ...rowsOf({ source: "luyentap365.com: 1 kg·m² under 30 N·m for 4 s", tolerance: 1e-9 }, [
    ["wheel time", "time to 120 rad/s", "s", 4],
    ["wheel energy", "energy that it then gives up to stand still", "J", 7200],
  ]),
  ...rowsOf({ source: "assignmentexpert.com 200261, compound train 60/40, 50/25, 30/24", tolerance: 1e-12 }, [
    ["train speed", "100 rpm in", "rpm", 375],
  ]),
  ...rowsOf({ source: "pastquestions.ng, JAMB 2023: 24.0 V and 1.0 ohm on 5.0 ohm", tolerance: 1e-12 }, [
    ["cell current", "current of a stalled winding of 5 ohm", "A", 4],
    ["cell voltage", "voltage at the cell", "V", 20],
  ]),
  ...rowsOf({ source: "easycalculation.com, Peukert: 250 A·h at 1 A, 20 A, exponent 1.3", tolerance: 1e-6 }, [
    ["Peukert 1.3", "discharge time", "h", 5.088631644],
  ]),
  ...rowsOf(
    {
      source: "Halliday, Resnick, Walker, Fundamentals of Physics, freight elevator with counterweight; g = 9.8",
      tolerance: 5e-3,
      fromMemory: true,
    },
    [["freight elevator", "1200 kg against 950 kg, 54 m in 3.0 min", "W", 735]],
  ),
];
