/** Published values of screws, worms, gear trains and hoists. */
import { type ReferenceRow, rowsOf } from "../row.js";

const SHIGLEY = "Budynas and Nisbett, Shigley's Mechanical Engineering Design";
const KHURMI = "R. S. Khurmi, Theory of Machines, ex. 13.1, p. 432";
const DUBEY = "G. K. Dubey, Fundamentals of Electrical Drives, ex. 2.1, p. 16";
const DERIVED = "elementary algebra, no outside print needed";

export const transmissionRows: readonly ReferenceRow[] = [
  ...rowsOf({ source: `${SHIGLEY}, ex. 8-1`, tolerance: 1e-4, fromMemory: true }, [
    ["E1 raising", "square thread, two starts: torque to raise", "N·m", 26.17695],
    ["E1 lowering", "torque to lower", "N·m", 9.774428],
    ["E1 efficiency", "overall efficiency", "1", 0.3112942],
  ]),
  ...rowsOf({ source: `${SHIGLEY}, 8th ed., problem 8-4`, tolerance: 5e-4 }, [
    ["E2 raising", "square thread: torque to raise", "N·m", 16.23],
    ["E2 lowering", "torque to lower", "N·m", 6.622],
    ["E2 efficiency", "overall efficiency", "1", 0.294, 1e-3],
  ]),
  ...rowsOf({ source: `${SHIGLEY}: tan λ ≤ f/cos φ; derived`, tolerance: 1e-6 }, [
    ["E6 worm", "lead angle where a worm of f = 0.05, φ = 14.5° stops running back", "deg", 2.956415],
  ]),
  ...rowsOf(
    { source: `${SHIGLEY}, table of worm gearset efficiencies, f = 0.05`, tolerance: 0.1, absolute: true, fromMemory: true },
    [
      ["E7 1", "lead angle 1°", "%", 25.2],
      ["E7 2.5", "lead angle 2.5°", "%", 45.7],
      ["E7 5", "lead angle 5°", "%", 62.6],
      ["E7 7.5", "lead angle 7.5°", "%", 71.3],
      ["E7 10", "lead angle 10°", "%", 76.6],
      ["E7 15", "lead angle 15°", "%", 82.7],
      ["E7 20", "lead angle 20°", "%", 85.6],
      ["E7 30", "lead angle 30°", "%", 88.7],
    ],
  ),
  ...rowsOf({ source: `${SHIGLEY}, the same equation, gear driving; derived`, tolerance: 5e-4 }, [
    ["E7 back 1", "lead angle 1°, φ = 14.5°", "1", -1.957],
    ["E7 back 2.5", "lead angle 2.5°", "1", -0.1825],
    ["E7 back 5", "lead angle 5°", "1", 0.40785],
    ["E7 back 10", "lead angle 10°", "1", 0.70073],
  ]),
  ...rowsOf({ source: KHURMI, tolerance: 1e-12 }, [["E9 train", "975 rpm through 20/50, 25/75, 26/65", "rpm", 52]]),
  ...rowsOf({ source: `${SHIGLEY}, ex. 13-3`, tolerance: 1e-12, fromMemory: true }, [
    ["E9 rounded", "88/16 twice", "1", 30.25],
    ["E9 exact", "96/16 and 80/16", "1", 30],
  ]),
  ...rowsOf({ source: `${DUBEY}; g = 9.81`, tolerance: 1e-5 }, [
    ["F2 inertia", "rotor, geared load and hoisted mass at the motor, losses left out", "kg·m²", 0.4017533],
    ["F2 geared torque", "10 N·m through 0.1 at 0.9", "N·m", 1.111111],
    ["F2 hoist torque", "1000 kg at 1.5 m/s and 1420 rpm, 0.85", "N·m", 116.4191],
  ]),
  ...rowsOf({ source: DERIVED, tolerance: 1e-6 }, [
    ["H2 arm", "2 kg at 0.4 m", "N·m", 7.84532],
    ["H2 raising current", "N 50, η 0.8, kt 0.02", "A", 9.80665],
    ["H2 raising voltage", "R 0.2", "V", 1.96133],
    ["H2 held current", "losses left out", "A", 7.84532],
    ["H2 held voltage", "losses left out", "V", 1.569064],
    ["H2 hoist at rest", "the hoist of F2 held, losses left out, at the motor", "N·m", 98.95627],
    ["H1 per speed", "(bR + K²)/K of the machine J 0.01, b 0.1, K 0.01, R 1", "V·s/rad", 10.01, 1e-9],
    ["H1 5 rad/s", "voltage for 5 rad/s", "V", 50.05, 1e-9],
  ]),
];
