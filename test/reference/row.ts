/** One published or independently derived value that the model is held to. Rows are data; how the model answers them is in answers/. */
export interface ReferenceRow {
  /** Topic and number of the worked example, then the quantity: "B1 torque". */
  readonly id: string;
  readonly quantity: string;
  readonly unit: string;
  readonly value: number;
  /** Allowed error as a share of `value`; of 1 unit where `absolute`. */
  readonly tolerance: number;
  readonly absolute?: true;
  /** Where the value was seen, or that it is elementary algebra, or common practice. */
  readonly source: string;
  /** The value was not seen in its source's text, but remembered. */
  readonly fromMemory?: true;
}

/** Answers of the model, by the row's id. */
export type Answers = Readonly<Record<string, () => number>>;

/** Rows of one worked example that share source and tolerance. */
export function rowsOf(
  common: Pick<ReferenceRow, "source" | "tolerance"> & Partial<Pick<ReferenceRow, "absolute" | "fromMemory">>,
  rows: readonly (readonly [id: string, quantity: string, unit: string, value: number, tolerance?: number])[],
): ReferenceRow[] {
  return rows.map(([id, quantity, unit, value, tolerance]) => ({
    ...common,
    id,
    quantity,
    unit,
    value,
    tolerance: tolerance ?? common.tolerance,
  }));
}
