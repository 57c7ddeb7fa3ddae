/** Which robots list which mechanisms, kept from round to round: an edit of a robot must reach the mechanisms that it lends its supply to. */
import type { Mechanism } from "../declarations/mechanism.js";
import type { ByFile } from "./byFile.js";
import type { Declared, DeclaredRobot } from "./declared.js";

export interface RobotLists {
  /** Ends a round; gives the files whose mechanisms are listed by other robots than before. */
  update(declared: ByFile<Declared>): ReadonlySet<string>;
  listersOf(mechanism: Mechanism): readonly Lister[];
  /** The one robot that lists the mechanism, and so lends its supply; with several, none of them is assumed. */
  lenderOf(mechanism: Mechanism): DeclaredRobot | undefined;
  /** The file that declares the mechanism. */
  fileOf(mechanism: Mechanism): string | undefined;
}

export interface Lister {
  readonly robot: DeclaredRobot;
  /** The file that declares it. */
  readonly file: string;
}

const NONE: readonly Lister[] = [];

export function createRobotLists(): RobotLists {
  const listers = new Map<Mechanism, readonly Lister[]>();
  const files = new WeakMap<Mechanism, string>();
  const listersIn = new Map<string, readonly Lister[]>();
  const listersOf = (mechanism: Mechanism) => listers.get(mechanism) ?? NONE;
  const takeAway = (lister: Lister, mechanism: Mechanism) => {
    const others = listersOf(mechanism).filter((one) => one !== lister);
    if (others.length === 0) listers.delete(mechanism);
    else listers.set(mechanism, others);
  };
  return {
    update({ of, changed }) {
      const touched = new Set<Mechanism>();
      const forEach = (file: string, act: (lister: Lister, mechanism: Mechanism) => void) => {
        for (const lister of listersIn.get(file) ?? NONE) {
          for (const mechanism of new Set(lister.robot.declared.mechanisms)) {
            act(lister, mechanism);
            touched.add(mechanism);
          }
        }
      };
      for (const file of changed) {
        const { mechanisms = [], robots = [] } = of.get(file) ?? {};
        for (const { declared } of mechanisms) if (declared !== undefined) files.set(declared, file);
        forEach(file, takeAway);
        if (robots.length === 0) listersIn.delete(file);
        else
          listersIn.set(
            file,
            robots.map((robot) => ({ robot, file })),
          );
      }
      for (const file of changed) {
        forEach(file, (lister, mechanism) => listers.set(mechanism, [...listersOf(mechanism), lister]));
      }
      return new Set([...touched].flatMap((mechanism) => files.get(mechanism) ?? []));
    },
    listersOf,
    lenderOf(mechanism) {
      const [lister, ...others] = listersOf(mechanism);
      return others.length === 0 ? lister?.robot : undefined;
    },
    fileOf: (mechanism) => files.get(mechanism),
  };
}
