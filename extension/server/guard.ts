/** Keeps a failure in one handler from reaching the client or ending the process: it is logged, and the answer is an empty one. */

export type Report = (what: string, error: unknown) => void;

export interface Guard {
  /** For requests: `fallback` is the answer when the handler fails. */
  answer<A extends readonly unknown[], R>(
    what: string,
    fallback: R,
    handler: (...args: A) => R | Promise<R>,
  ): (...args: A) => Promise<R>;
  /** For notifications and events. */
  act<A extends readonly unknown[]>(what: string, handler: (...args: A) => unknown): (...args: A) => Promise<void>;
}

export function createGuard(report: Report): Guard {
  const answer: Guard["answer"] =
    (what, fallback, handler) =>
    async (...args) => {
      try {
        return await handler(...args);
      } catch (error) {
        report(what, error);
        return fallback;
      }
    };
  return {
    answer,
    act: (what, handler) =>
      answer(what, undefined, async (...args) => {
        await handler(...args);
      }),
  };
}

export type Attempt = <T>(what: string, work: () => T) => T | undefined;

/** For work beside other work, which must be done even where this fails. */
export function createAttempt(report: Report): Attempt {
  return (what, work) => {
    try {
      return work();
    } catch (error) {
      report(what, error);
      return undefined;
    }
  };
}

/** An error as text for the log, with where it came from. */
export function describeError(error: unknown): string {
  if (!(error instanceof Error)) return String(error);
  return error.stack?.includes(error.message) ? error.stack : `${error.message}\n${error.stack ?? ""}`;
}
