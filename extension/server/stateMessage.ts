/** What the client's view and status bar show, as one message. */

import type { Span } from "../evaluator/value.js";
import { type MechanismNode, mechanismTree } from "../features/mechanismTree.js";
import { statusOf } from "../features/status.js";
import type { Place } from "../protocol/place.js";
import type { MechanismState, State } from "../protocol/state.js";
import { rememberAddresses } from "./diagnostics.js";
import type { Result } from "./session.js";

export function stateOf({ analysis, snapshot }: Result, uriOf: (file: string) => string): State {
  const addressOf = rememberAddresses(uriOf);
  const placeOf = (at: Span): Place => ({ uri: addressOf(at.file), range: snapshot.lineMap(at.file).rangeOf(at) });
  const mechanismOf = ({ name, label, description, tooltip, at, state }: MechanismNode): MechanismState => ({
    name,
    label,
    description,
    tooltip,
    standing: state,
    place: placeOf(at),
  });
  const { robots, apart } = mechanismTree(analysis);
  const status = statusOf(analysis);
  return {
    robots: robots.map(({ label, at, state, mechanisms }) => ({
      label,
      standing: state,
      place: placeOf(at),
      mechanisms: mechanisms.map(mechanismOf),
    })),
    apart: apart.map(mechanismOf),
    status: status === undefined ? null : { text: status.text, tooltip: status.tooltip, standing: status.state },
  };
}
