/** Units against published conversion factors, and against two general unit libraries. */
import Qty from "js-quantities";
import { unit as mathUnit } from "mathjs";
import { describe, expect, it } from "vitest";
import { fromSi, parseAnyQuantity, toSi } from "../../extension/units/parse.js";
import { UNITS } from "../../extension/units/table.js";

interface Row {
  readonly quantity: string;
  readonly si: number;
  readonly tolerance: number;
  readonly source: string;
}

const SP811 = "NIST SP 811 (2008), App. B.8 and B.9 (from memory)";
const REC20 = "UN/ECE Recommendation 20, codes F21, M92, L41; NIST SP 811 B.8";
const ALGEBRA = "elementary algebra from the exact factors";

const ROWS: readonly Row[] = [
  { quantity: "1 lb", si: 0.45359237, tolerance: 1e-12, source: SP811 },
  { quantity: "16 oz", si: 0.45359237, tolerance: 1e-12, source: SP811 },
  { quantity: "1 in", si: 0.0254, tolerance: 1e-12, source: SP811 },
  { quantity: "1 ft", si: 0.3048, tolerance: 1e-12, source: SP811 },
  { quantity: "1 kgf", si: 9.80665, tolerance: 1e-12, source: SP811 },
  { quantity: "1 lbf", si: 4.4482216152605, tolerance: 1e-12, source: SP811 },
  { quantity: "1 ozf", si: 0.27801385095378, tolerance: 1e-12, source: SP811 },
  { quantity: "1 deg", si: 0.017453292519943295, tolerance: 1e-12, source: SP811 },
  { quantity: "1 rpm", si: 0.10471975511965977, tolerance: 1e-12, source: SP811 },
  { quantity: "1 lbf*in", si: 0.112984829, tolerance: 2e-9, source: REC20 },
  { quantity: "1 in*lbf", si: 0.112984829, tolerance: 2e-9, source: REC20 },
  { quantity: "1 lbf*ft", si: 1.355817948, tolerance: 1e-9, source: REC20 },
  { quantity: "1 ft*lbf", si: 1.355817948, tolerance: 1e-9, source: REC20 },
  { quantity: "1 ozf*in", si: 7.06155181e-3, tolerance: 1e-9, source: REC20 },
  { quantity: "1 in*ozf", si: 7.06155181e-3, tolerance: 1e-9, source: REC20 },
  { quantity: "1 kgf*cm", si: 0.0980665, tolerance: 1e-12, source: SP811 },
  { quantity: "1 kgf*m", si: 9.80665, tolerance: 1e-12, source: SP811 },
  { quantity: "1 gf*cm", si: 9.80665e-5, tolerance: 1e-12, source: SP811 },
  { quantity: "1 hp", si: 745.699872, tolerance: 1e-9, source: SP811 },
  { quantity: "1 metric-hp", si: 735.49875, tolerance: 1e-12, source: SP811 },
  { quantity: "1 electric-hp", si: 746, tolerance: 0, source: SP811 },
  { quantity: "1 mph", si: 0.44704, tolerance: 1e-12, source: SP811 },
  { quantity: "1 ft/s", si: 0.3048, tolerance: 1e-12, source: SP811 },
  { quantity: "9.549296586 rpm", si: 1, tolerance: 1e-9, source: SP811 },
  { quantity: "32 degF", si: 273.15, tolerance: 1e-12, source: SP811 },
  { quantity: "1 V/krpm", si: 9.549296586e-3, tolerance: 1e-9, source: ALGEBRA },
  { quantity: "9.549296586 rpm/V", si: 1, tolerance: 1e-9, source: ALGEBRA },
  // 1352.2944 rpm/V belongs to 1 ozf·in/A, 84.51840 rpm/V to 1 lbf·in/A.
  { quantity: "1352.2944 rpm/V", si: 7.06155181e-3, tolerance: 1e-7, source: ALGEBRA },
  { quantity: "84.51840 rpm/V", si: 0.112984829, tolerance: 1e-7, source: ALGEBRA },
];

describe("units against published factors", () => {
  it.each(ROWS)("$quantity is $si ($source)", ({ quantity, si, tolerance }) => {
    const parsed = parseAnyQuantity(quantity);
    expect(parsed).toBeDefined();
    expect(Math.abs((parsed?.si ?? 0) / si - 1)).toBeLessThanOrEqual(tolerance);
  });

  it("reproduces the handbook constants of shaft power (Shigley's 63 025 and its kin; rest is algebra)", () => {
    const rpm = si("1 rpm");
    expect(si("1 hp") / (si("1 lbf*in") * rpm)).toBeCloseTo(63025.36, 1);
    expect(si("1 hp") / (si("1 lbf*ft") * rpm)).toBeCloseTo(5252.113, 3);
    expect(si("1 W") / (si("1 ozf*in") * rpm)).toBeCloseTo(1352.294, 3);
    expect(si("1 kW") / (si("1 N*m") * rpm)).toBeCloseTo(9549.297, 3);
  });
});

/** Spellings of the two libraries where they differ from ours; `null`: the library has no such unit. */
const OTHER_SPELLINGS: Readonly<Record<string, { readonly js: string | null; readonly mathjs: string | null }>> = {
  lbf: { js: "lbf", mathjs: "lbf" },
  in: { js: "in", mathjs: "in" },
  ft: { js: "ft", mathjs: "ft" },
  lb: { js: "lb", mathjs: "lbm" },
  oz: { js: "oz", mathjs: "oz" },
  rpm: { js: "rpm", mathjs: null },
  hp: { js: "hp", mathjs: "hp" },
  mph: { js: "mph", mathjs: "mile/hour" },
  deg: { js: "deg", mathjs: "deg" },
  "lbf*in": { js: "lbf*in", mathjs: "lbf in" },
  "lbf*ft": { js: "lbf*ft", mathjs: "lbf ft" },
  "lb*in^2": { js: "lb*in^2", mathjs: "lbm in^2" },
  "W*h": { js: "W*h", mathjs: "W h" },
  "A*h": { js: "A*h", mathjs: "A h" },
  "g*cm^2": { js: "g*cm^2", mathjs: "g cm^2" },
  "km/h": { js: "km/h", mathjs: "km/h" },
};

describe("units against general libraries", () => {
  const known = Object.entries(OTHER_SPELLINGS);
  it.each(known.filter(([, other]) => other.js !== null))("%s as js-quantities has it", (symbol, { js }) => {
    expect(Qty(`1 ${js}`).toBase().scalar / si(`1 ${symbol}`)).toBeCloseTo(1, 6);
  });
  it.each(known.filter(([, other]) => other.mathjs !== null))("%s as mathjs has it", (symbol, { mathjs }) => {
    const inSi = mathUnit(1, mathjs ?? "").toSI();
    expect(Number(inSi.toNumeric(inSi.formatUnits())) / si(`1 ${symbol}`)).toBeCloseTo(1, 9);
  });
});

describe("every unit", () => {
  it.each([...UNITS.keys()])("%s survives the way to SI and back", (symbol) => {
    const unit = UNITS.get(symbol);
    if (unit === undefined) throw new Error(symbol);
    for (const value of [1e-9, 0.37, 1, 42.5, 1e9]) {
      // A temperature's offset costs digits of small numbers: compare on the scale of the offset.
      const scale = Math.max(value, (unit.offset ?? 0) / unit.factor);
      expect(Math.abs(fromSi(toSi(value, unit), unit) - value) / scale).toBeLessThan(1e-12);
    }
  });
});

function si(text: string): number {
  const parsed = parseAnyQuantity(text);
  if (parsed === undefined) throw new Error(`not a quantity: ${text}`);
  return parsed.si;
}
