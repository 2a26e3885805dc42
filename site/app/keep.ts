/** What the page keeps on this device between visits: the last plan, and the cards and clinic that were opened. */
import type { Card, Clinic, Plan } from "./types";

const KEY = "farside.last.1";

export interface Kept {
  readonly plan: Plan;
  readonly from: string;
  readonly cards: readonly Card[];
  readonly clinic: Clinic | null;
}

/** Nothing is kept where storage is off or full; the page works on without it. */
export function keep(kept: Kept): void {
  try {
    localStorage.setItem(KEY, JSON.stringify(kept));
  } catch {
    return;
  }
}

export function lastKept(): Kept | null {
  try {
    const kept: unknown = JSON.parse(localStorage.getItem(KEY) ?? "null");
    return isKept(kept) ? kept : null;
  } catch {
    return null;
  }
}

export function forget(): void {
  try {
    localStorage.removeItem(KEY);
  } catch {
    return;
  }
}

function isKept(value: unknown): value is Kept {
  if (typeof value !== "object" || value === null) return false;
  const { plan, cards } = value as Partial<Kept>;
  return (
    Array.isArray(cards) &&
    typeof plan?.title === "string" &&
    Array.isArray(plan.increments) &&
    plan.increments.length > 0 &&
    plan.increments.every((each) => typeof each === "object" && each !== null)
  );
}
