/**
 * Remembers the times in which a supply was below the voltage that it must stay above.
 *
 * Deliberately not here: whether they matter.
 */
import type { SagHistory, SagStretch } from "./robotSolution.js";

export interface SagMoment {
  readonly voltageV: number;
  /** Mechanisms in motion. */
  readonly moving: readonly number[];
  /** What each mechanism takes from the supply, A. */
  readonly supplyA: readonly number[];
}

export interface SagRecord {
  readonly isOpen: () => boolean;
  readonly begin: (timeS: number) => void;
  /** Takes in a moment below. */
  readonly deepen: (timeS: number, moment: SagMoment) => void;
  readonly end: (timeS: number) => void;
  readonly history: () => SagHistory;
}

const MOST_TOLD = 100;
/** Two depths nearer than this share of each other are the same: the earlier moment is told. */
const SAME = 1e-9;

export function createSagRecord(): SagRecord {
  const stretches: SagStretch[] = [];
  let count = 0;
  let longest: SagStretch | null = null;
  let current: { startS: number; lowestV: number; lowestAtS: number; moved: Set<number>; supplyA: readonly number[] } | null =
    null;

  function end(timeS: number): void {
    if (current === null) return;
    const { startS, lowestV, lowestAtS, moved, supplyA } = current;
    current = null;
    if (!(timeS > startS)) return;
    const rising = [...moved].sort((one, other) => one - other);
    const stretch: SagStretch = { startS, lastsS: timeS - startS, lowestV, lowestAtS, moved: rising, supplyA };
    count++;
    if (stretches.length < MOST_TOLD) stretches.push(stretch);
    if (longest === null || stretch.lastsS > longest.lastsS * (1 + SAME)) longest = stretch;
  }

  return {
    isOpen: () => current !== null,
    begin: (timeS) => {
      current ??= { startS: timeS, lowestV: Number.POSITIVE_INFINITY, lowestAtS: timeS, moved: new Set(), supplyA: [] };
    },
    deepen: (timeS, { voltageV, moving, supplyA }) => {
      if (current === null) return;
      for (const index of moving) current.moved.add(index);
      if (voltageV >= current.lowestV * (1 - SAME)) return;
      current.lowestV = voltageV;
      current.lowestAtS = timeS;
      current.supplyA = supplyA;
    },
    end,
    history: () => ({ count, stretches, longest }),
  };
}
