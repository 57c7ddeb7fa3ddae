/**
 * A hoist small enough to work out by hand, and the hand's arithmetic: what the features show is held to it, never to the model's output.
 *
 * The motor's straight line goes through the two points of its sheet: ω = ω0·(1 − T/Ts), I = I0 + (Is − I0)·T/Ts at the sheet's voltage,
 * since its loss grows with speed. No battery is declared, so that this is the available line.
 */
export const SHEET = { voltageV: 12, noLoadRpm: 120, noLoadA: 0.3, stallNm: 3, stallA: 6 };

/** As source, for fixtures. */
export const MOTOR = `motor({
  voltage: "12 V",
  noLoad: { speed: "120 rpm", current: "0.3 A" },
  stall: { torque: "3 N*m", current: "6 A" },
})`;

/** Weight of `massKg` on a drum of `radiusM`, N·m. Standard gravity: CGPM 1901. */
export function liftTorque(massKg: number, radiusM: number): number {
  return massKg * 9.80665 * radiusM;
}

export interface HandPoint {
  readonly motorNm: number;
  readonly share: number;
  readonly motorRpm: number;
  readonly currentA: number;
  readonly outputRpm: number;
  readonly outputStallNm: number;
}

/** One motor (of `count`) that brings `outputNm` behind a ratio with an efficiency. */
export function handPoint(outputNm: number, ratio: number, efficiency: number, count = 1): HandPoint {
  const motorNm = outputNm / (ratio * efficiency * count);
  const share = motorNm / SHEET.stallNm;
  const motorRpm = Math.max(SHEET.noLoadRpm * (1 - share), 0);
  return {
    motorNm,
    share,
    motorRpm,
    currentA: share >= 1 ? SHEET.stallA : SHEET.noLoadA + (SHEET.stallA - SHEET.noLoadA) * share,
    outputRpm: motorRpm / ratio,
    outputStallNm: SHEET.stallNm * ratio * efficiency * count,
  };
}

/** Three significant digits, as people read them; for numbers from 0.001 to 99999. */
export function three(value: number): string {
  return String(Number(value.toPrecision(3)));
}

/** Whole per cents; for shares from 10 %. */
export function perCent(share: number): string {
  return `${Math.round(share * 100)} %`;
}

/**
 * Time to raise `massKg` by `travelM` from rest, s. The line and a constant load give J·dω/dt = A − B·ω, so that
 * θ = ω∞·(t − τ·(1 − e^(−t/τ))), solved for t by repetition; J = m·r² (the rotor has none), both at the output shaft.
 */
export function liftTime(massKg: number, radiusM: number, travelM: number, ratio: number, efficiency: number): number {
  const noLoad = (SHEET.noLoadRpm * Math.PI) / 30;
  const slope = (ratio * ratio * efficiency * SHEET.stallNm) / noLoad;
  const steady = (ratio * efficiency * SHEET.stallNm - liftTorque(massKg, radiusM)) / slope;
  const settling = (massKg * radiusM * radiusM) / slope;
  let time = travelM / radiusM / steady;
  for (let round = 0; round < 50; round++) time = travelM / radiusM / steady + settling * (1 - Math.exp(-time / settling));
  return time;
}
