/** What two orders are compared by. */
export interface Standing {
  readonly worth: number;
  /** Jobs that the previous plan had too. */
  readonly known: number;
  readonly end_ms: number;
}

export interface Candidate extends Standing {
  readonly order: readonly number[];
}

/** Sums in another order may differ in their last digits. */
const SAME = 1e-9;

/** The larger worth; of equal ones the more of the previous plan; of these the earlier end. */
export function isBetter(a: Standing, b: Standing): boolean {
  const gain = a.worth - b.worth;
  if (Math.abs(gain) > SAME * (1 + Math.abs(b.worth))) return gain > 0;
  if (a.known !== b.known) return a.known > b.known;
  return a.end_ms < b.end_ms;
}
