/** Edits of a whole plan: a new one, its increments in order, and what the clinic's usual values give it. */
import { at, put } from "./paths";
import type { Clinic, Data, Json, Path, Plan } from "./types";

export const MOST_INCREMENTS = 40;
export const MOST_EXPOSURES = 20;

const PORTION: Data = { thickness_mm: 2, cover: "none", exposures: [{ time_s: 20 }] };

/** A plan that says as little as a plan may; the clinic's usual values fill the rest. */
export function newPlan(title: string): Plan {
  return {
    kind: "plan",
    title,
    cavity: { depth_mm: 4, width_mm: 4 },
    gap_mm: 2,
    increments: [PORTION, PORTION],
  };
}

/** The value that counts at a path: the plan's own, else the clinic's usual one. */
export function effective(plan: Plan, clinic: Clinic | null, path: Path): Json | undefined {
  const own = at(plan, path);
  if (own !== undefined) return own;
  const usual = clinic?.usual;
  if (path[0] === "increments")
    return path.length === 3 && path[2] === "composite" ? at(usual, ["composite"]) : undefined;
  return at(usual, path);
}

/** The plan with one value changed. Lists are taken whole from the clinic, so a usual list is copied before one of its items changes. */
export function edited(plan: Plan, clinic: Clinic | null, path: Path, value: Json | undefined): Plan {
  const list = path.findIndex((step) => typeof step === "number");
  const inside = list < 0 ? [] : path.slice(0, list);
  const usual = list < 0 || at(plan, inside) !== undefined ? undefined : at(clinic?.usual, inside);
  return put(usual === undefined ? plan : put(plan, inside, usual), path, value);
}

export function withIncrement(plan: Plan, after: number, copy: boolean): Plan {
  const model = plan.increments[after] ?? PORTION;
  const added: Data = copy
    ? model
    : { ...PORTION, ...only(model, ["composite", "composite_temperature_c", "placing_s"]) };
  return { ...plan, increments: spliced(plan.increments, after + 1, 0, added) };
}

export function withoutIncrement(plan: Plan, index: number): Plan {
  return plan.increments.length === 1 ? plan : { ...plan, increments: spliced(plan.increments, index, 1) };
}

/** The increment moved one place towards the floor (-1) or the opening (1). */
export function movedIncrement(plan: Plan, index: number, by: 1 | -1): Plan {
  const moved = plan.increments[index];
  if (moved === undefined || index + by < 0 || index + by >= plan.increments.length) return plan;
  return { ...plan, increments: spliced(spliced(plan.increments, index, 1), index + by, 0, moved) };
}

/** The list at a path, if there is one. */
export function listAt(plan: Plan, clinic: Clinic | null, path: Path): readonly Data[] {
  const list = effective(plan, clinic, path);
  return Array.isArray(list) ? (list as readonly Data[]) : [];
}

function only(data: Data, keys: readonly string[]): Data {
  return Object.fromEntries(keys.filter((key) => data[key] !== undefined).map((key) => [key, data[key]]));
}

function spliced<T>(list: readonly T[], index: number, removed: number, ...added: T[]): readonly T[] {
  return [...list.slice(0, index), ...added, ...list.slice(index + removed)];
}
