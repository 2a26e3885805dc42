/** The shapes that pass between the page and the engine: plans, cards, reports, drawings, refusals. */

export type Mark = "stop" | "revise" | "open" | "watch" | "clear";
export type Step = string | number;
export type Path = readonly Step[];
export type Json = null | boolean | number | string | readonly Json[] | { readonly [key: string]: Json | undefined };
export type Data = { readonly [key: string]: Json | undefined };

/** A plan as its file has it. Only what the page itself relies on is typed; the schema says the rest. */
export type Plan = Data & { readonly kind: "plan"; readonly title: string; readonly increments: readonly Data[] };
export type Card = Data & { readonly kind: string; readonly id: string; readonly title: string };
export type Clinic = Data & { readonly usual?: Data };

export interface Problem {
  readonly file: string;
  readonly line: number;
  readonly column: number;
  readonly path: Path;
  readonly message: string;
  readonly text: string;
  readonly shown: string;
}

export interface Limit {
  readonly limit: string;
  readonly value: number;
  readonly shown: string;
  readonly finding: Mark;
  readonly side: "below" | "above" | "at_most" | "at_least";
}

export interface Measured {
  readonly name: string;
  readonly value: number;
  readonly shown: string;
  readonly unit: string;
  readonly label: string;
  readonly against: readonly Limit[];
}

export interface Where {
  readonly layer?: string | null;
  readonly increment?: number | null;
  readonly exposure?: number | null;
  readonly composite?: string | null;
  readonly lamp?: string | null;
}

export interface Finding {
  readonly rule: string;
  readonly title: string;
  readonly topic: string;
  readonly finding: Mark;
  /** Whether it stands whatever the plan. */
  readonly standing: boolean;
  readonly about: string;
  readonly where: Where;
  readonly measured: Measured | null;
  readonly missing: readonly string[];
  readonly says: string;
  readonly do: string;
  readonly sources: readonly string[];
  readonly strength: string;
  readonly caution: string | null;
  readonly changed: Json;
}

export interface Quantity {
  readonly value: number;
  readonly provenance?: string;
}

export interface Report {
  readonly verdict: Mark;
  readonly verdict_says: string;
  readonly clear_says: string;
  readonly on: string;
  readonly caution: string;
  readonly protocol: Protocol;
  readonly lamp: { readonly id: string; readonly quantities: { readonly [name: string]: Quantity | undefined } };
  readonly findings: readonly Finding[];
  readonly not_applied: readonly string[];
}

export interface Protocol {
  readonly id: string;
  readonly edition: string;
  readonly digest: string;
}

export interface DrawnIncrement {
  readonly number: number;
  readonly top_mm: number;
  readonly bottom_mm: number;
  readonly far_share: number | null;
  readonly far_shown: string | null;
  readonly finding: Mark;
  readonly profile: readonly (readonly [number, number])[];
  readonly short_from_mm: number | null;
}

export interface ClockStep {
  readonly layer: "adhesive" | "liner" | "increment" | "after";
  readonly number: number | null;
  readonly what: "expose" | "place" | "rest";
  readonly start_s: number;
  readonly length_s: number;
}

export interface Drawing {
  readonly cavity: {
    readonly depth_mm: number;
    readonly width_mm: number;
    readonly remaining_dentine_mm: number | null;
  };
  readonly tip: { readonly diameter_mm: number; readonly gap_mm: number; readonly spread_exponent: number };
  readonly increments: readonly DrawnIncrement[];
  readonly clock: readonly ClockStep[];
  readonly clock_s: number;
  readonly window_s: readonly {
    readonly number: number;
    readonly window_s: number | null;
    readonly placing_s: number | null;
  }[];
}

/** What the engine says when it is ready. */
export interface Start {
  readonly engine: string;
  readonly protocol: Protocol;
  readonly rules: readonly {
    readonly id: string;
    readonly title: string;
    readonly topic: string;
    readonly page: string;
  }[];
  readonly plans: readonly { readonly name: string; readonly data: Plan }[];
  readonly cards: readonly Card[];
  readonly clinic: Clinic;
  readonly caution: string;
}

/** What the engine will not take, or a defect of its own. */
export type Refusal =
  { readonly ok: false; readonly problems: readonly Problem[] } | { readonly ok: false; readonly fault: string };

export type Answer = { readonly ok: true; readonly report: Report; readonly drawing: Drawing } | Refusal;
export type OpenAnswer =
  | { readonly ok: true; readonly plan: Plan | null; readonly cards: readonly Card[]; readonly clinic: Clinic | null }
  | Refusal;

/** The problems of a refusal; a defect of the engine is said as one, with no place. */
export function problemsOf(refusal: Refusal): readonly Problem[] {
  if ("problems" in refusal) return refusal.problems;
  return [{ file: "", line: 0, column: 0, path: [], message: refusal.fault, text: "", shown: refusal.fault }];
}
