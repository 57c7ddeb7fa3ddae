// What a run of tests gives, wherever it ran. A part that could not run says why and counts nothing.

export interface TestResult {
  readonly title: string;
  /** Absent when the test passed. */
  readonly failure?: string;
  /** Why its first try failed, where it passed on the second. */
  readonly firstTry?: string | undefined;
}

export type PartResult = { readonly tests: readonly TestResult[] } | { readonly notRun: string };
