/** Median, least and largest of some numbers. */
export function spread(values) {
  const sorted = [...values].sort((a, b) => a - b);
  const middle = (sorted.length - 1) / 2;
  const median = (sorted[Math.floor(middle)] + sorted[Math.ceil(middle)]) / 2;
  return { median, least: sorted[0], largest: sorted.at(-1), values };
}

/** Quotients round by round: what slows the machine down for a round slows both sides. */
export const paired = (over, under) => spread(over.map((value, i) => value / under[i]));
