/** The cautions that go with every result, always in view below the chart. */
export const CAUTIONS = [
  "Estimates, not a safety assessment.",
  "Lifts and arms fall when power is lost: block them before working on them.",
  "Never raise a fuse or breaker rating to silence a finding.",
  "Keep hands out of powered gears.",
  "Hot windings burn and lithium packs can catch fire: follow the makers' instructions, the event's or site's electrical rules, local codes and licensed practice.",
].join(" ");
