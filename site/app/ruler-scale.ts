/** The ruler's arithmetic: which finding each stretch of the line stands for, as the rule's own limits say. */
import type { Limit, Mark, Measured } from "./types";

const SEVERITY: readonly Mark[] = ["clear", "watch", "open", "revise", "stop"];
const MOST_OF_LIMITS = 2.5;
/** On which side of a limit the finding lies. */
const FAILS: Record<Limit["side"], (value: number, limit: number) => boolean> = {
  below: (value, limit) => value < limit,
  at_most: (value, limit) => value <= limit,
  above: (value, limit) => value > limit,
  at_least: (value, limit) => value >= limit,
};

export interface Zone {
  readonly from: number;
  readonly to: number;
  readonly mark: Mark;
}

export interface RulerScale {
  readonly least: number;
  readonly most: number;
  readonly zones: readonly Zone[];
}

/** The stretch of values that a ruler shows: the limits and the figures, but no more than a few times the limits. */
export function rulerScale(measured: readonly Measured[]): RulerScale {
  const limits = measured[0]?.against ?? [];
  const marks = limits.map((limit) => limit.value);
  const values = measured.map((each) => each.value);
  const least = Math.min(
    0,
    ...marks.map((mark) => mark * 1.25),
    ...values.map((value) => Math.max(value, -MOST_OF_LIMITS * size(marks))),
  );
  const furthest = Math.max(...marks, ...values.map((value) => Math.min(value, MOST_OF_LIMITS * size(marks))));
  const most = least + (furthest - least) * 1.15 || 1;
  const cuts = [
    least,
    ...[...new Set(marks)].filter((mark) => mark > least && mark < most).sort((a, b) => a - b),
    most,
  ];
  const zones = cuts.slice(1).map((to, index) => {
    const from = cuts[index] ?? least;
    return { from, to, mark: markAt((from + to) / 2, limits) };
  });
  return { least, most, zones: merged(zones) };
}

function size(marks: readonly number[]): number {
  return Math.max(...marks.map(Math.abs), 1e-9);
}

function markAt(value: number, limits: readonly Limit[]): Mark {
  const failed = limits.filter((limit) => FAILS[limit.side](value, limit.value));
  return failed.reduce<Mark>(
    (worst, limit) => (SEVERITY.indexOf(limit.finding) > SEVERITY.indexOf(worst) ? limit.finding : worst),
    "clear",
  );
}

function merged(zones: readonly Zone[]): readonly Zone[] {
  return zones.reduce<readonly Zone[]>((done, zone) => {
    const last = done.at(-1);
    return last?.mark === zone.mark ? [...done.slice(0, -1), { ...last, to: zone.to }] : [...done, zone];
  }, []);
}
