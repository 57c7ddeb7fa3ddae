/** Tooth counts that are commonly kept (common practice, no source); `toothCounts` in the project's settings replaces them. */
export const COMMON_TOOTH_COUNTS: readonly number[] = [
  10, 12, 14, 15, 16, 18, 20, 22, 24, 25, 28, 30, 32, 36, 40, 45, 48, 50, 54, 60, 64, 72, 80, 84, 90, 96, 100, 108, 120,
];
