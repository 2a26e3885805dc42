/** Everything the page knows at one moment, and the one function that leads from one moment to the next. */
import type { Kept } from "./keep";
import { edited, movedIncrement, newPlan, withIncrement, withoutIncrement } from "./plan";
import { samePath } from "./paths";
import {
  problemsOf,
  type Answer,
  type Card,
  type Clinic,
  type Drawing,
  type Json,
  type Path,
  type Plan,
  type Problem,
  type Report,
  type Start,
} from "./types";
import { words } from "./words/index";

export type Panel = "increment" | "cavity" | "lamp" | "adhesive" | "room";

export interface State {
  readonly start: Start | null;
  readonly progress: number;
  /** Why the engine could not start, or fell silent. */
  readonly trouble: string | null;
  readonly plan: Plan;
  /** What the plan came from, as the page says it. */
  readonly from: string;
  readonly touched: boolean;
  readonly cards: readonly Card[];
  readonly clinic: Clinic | null;
  readonly answered: { readonly plan: Plan; readonly report: Report; readonly drawing: Drawing } | null;
  /** Why the engine will not check the plan as it stands; the last answer stays on view, marked as past. */
  readonly refused: { readonly plan: Plan; readonly problems: readonly Problem[] } | null;
  /** Files that were not opened, with the engine's placed messages. */
  readonly unopened: readonly Problem[];
  readonly opened: readonly string[];
  readonly selected: number;
  readonly panel: Panel;
  readonly filesShown: boolean;
  readonly past: readonly Version[];
  readonly future: readonly Version[];
  /** Where the last edit was typed: further letters there are the same step of undoing. */
  readonly typing: string | null;
}

export interface Version {
  readonly plan: Plan;
  readonly from: string;
}

export type Action =
  | { readonly is: "progress"; readonly share: number }
  | { readonly is: "started"; readonly start: Start }
  | { readonly is: "slow" }
  | { readonly is: "trouble"; readonly says: string }
  | { readonly is: "answered"; readonly plan: Plan; readonly answer: Answer }
  | { readonly is: "edit"; readonly path: Path; readonly value: Json | undefined }
  | { readonly is: "add"; readonly copy: boolean }
  | { readonly is: "remove" }
  | { readonly is: "move"; readonly by: 1 | -1 }
  | { readonly is: "undo" | "redo" }
  | { readonly is: "select"; readonly index: number }
  | { readonly is: "panel"; readonly panel: Panel }
  | { readonly is: "files"; readonly shown: boolean }
  | { readonly is: "new" }
  | { readonly is: "example"; readonly name: string }
  | {
      readonly is: "opened";
      readonly plan: Plan | null;
      readonly cards: readonly Card[];
      readonly clinic: Clinic | null;
      readonly names: readonly string[];
    }
  | { readonly is: "unopened"; readonly problems: readonly Problem[] };

const FIRST_EXAMPLE = "deep-box";
const MOST_UNDO = 100;

export function firstState(kept: Kept | null): State {
  return {
    start: null,
    progress: 0,
    trouble: null,
    plan: kept?.plan ?? newPlan(words.files.newTitle),
    from: kept?.from ?? words.files.fromNew,
    touched: kept !== null,
    cards: kept?.cards ?? [],
    clinic: kept?.clinic ?? null,
    answered: null,
    refused: null,
    unopened: [],
    opened: [],
    selected: 0,
    panel: "increment",
    filesShown: false,
    past: [],
    future: [],
    typing: null,
  };
}

export function next(state: State, action: Action): State {
  switch (action.is) {
    case "progress":
      return { ...state, progress: action.share, trouble: null };
    case "slow":
      return { ...state, trouble: words.trouble.slow };
    case "trouble":
      return { ...state, trouble: action.says };
    case "started":
      return started({ ...state, start: action.start, progress: 1, trouble: null });
    case "answered":
      return answeredWith(state, action.plan, action.answer);
    case "edit":
      return typed(state, action.path, action.value);
    case "add":
      return {
        ...changed(state, withIncrement(state.plan, state.selected, action.copy)),
        selected: state.selected + 1,
        panel: "increment",
      };
    case "remove":
      return {
        ...changed(state, withoutIncrement(state.plan, state.selected)),
        selected: Math.max(0, state.selected - 1),
      };
    case "move":
      return {
        ...changed(state, movedIncrement(state.plan, state.selected, action.by)),
        selected: state.selected + action.by,
      };
    case "undo":
      return undone(state);
    case "redo":
      return redone(state);
    case "select":
      return { ...state, selected: action.index, panel: "increment" };
    case "panel":
      return { ...state, panel: action.panel };
    case "files":
      return { ...state, filesShown: action.shown, unopened: [], opened: [] };
    case "new":
      return replaced(state, newPlan(words.files.newTitle), words.files.fromNew);
    case "example":
      return example(state, action.name);
    case "opened":
      return openedWith(state, action);
    case "unopened":
      return { ...state, unopened: action.problems, opened: [] };
  }
}

/** The clinic whose usual values count: an opened one, else the example's. */
export function clinicOf(state: State): Clinic | null {
  return state.clinic ?? state.start?.clinic ?? null;
}

/** The cards to choose from: an opened card stands in for the example's of its kind and id. */
export function cardsOf(state: State): readonly Card[] {
  return withHeld(state.cards, state.start?.cards ?? []);
}

export function working(state: State): boolean {
  return state.answered?.plan !== state.plan && state.refused?.plan !== state.plan;
}

/** What the engine says against the value at this path, as the plan stands. */
export function problemAt(state: State, path: Path): string | null {
  if (state.refused?.plan !== state.plan) return null;
  return state.refused.problems.find((problem) => samePath(problem.path, path))?.message ?? null;
}

function started(state: State): State {
  return state.touched ? state : { ...example(state, FIRST_EXAMPLE), touched: false };
}

function answeredWith(state: State, plan: Plan, answer: Answer): State {
  if (answer.ok)
    return {
      ...state,
      answered: { plan, report: answer.report, drawing: answer.drawing },
      refused: null,
      trouble: null,
    };
  return { ...state, refused: { plan, problems: problemsOf(answer) } };
}

function changed(state: State, plan: Plan): State {
  if (plan === state.plan) return state;
  return {
    ...state,
    plan,
    touched: true,
    past: [...state.past, versionOf(state)].slice(-MOST_UNDO),
    future: [],
    typing: null,
  };
}

function typed(state: State, path: Path, value: Json | undefined): State {
  const place = typeof value === "string" ? path.join("/") : null;
  const next = changed(state, edited(state.plan, clinicOf(state), path, value));
  return { ...next, past: place !== null && place === state.typing ? state.past : next.past, typing: place };
}

function versionOf({ plan, from }: State): Version {
  return { plan, from };
}

function replaced(state: State, plan: Plan, from: string): State {
  return { ...changed(state, plan), from, selected: 0, panel: "increment", filesShown: false, unopened: [] };
}

function example(state: State, name: string): State {
  const plans = state.start?.plans ?? [];
  const found = plans.find((plan) => plan.name === name) ?? plans[0];
  return found === undefined ? state : replaced(state, found.data, words.files.fromExample);
}

/** New cards, and those held before that no new one takes the place of. */
function withHeld(brought: readonly Card[], held: readonly Card[]): readonly Card[] {
  const keys = new Set(brought.map(keyOf));
  return [...brought, ...held.filter((card) => !keys.has(keyOf(card)))];
}

function keyOf({ kind, id }: Card): string {
  return `${kind} ${id}`;
}

function openedWith(state: State, opened: Extract<Action, { is: "opened" }>): State {
  const cards = withHeld(opened.cards, state.cards);
  const base = { ...state, cards, clinic: opened.clinic ?? state.clinic, answered: null };
  const plan = opened.plan === null ? { ...state.plan } : opened.plan;
  const from = opened.plan === null ? state.from : words.files.fromFile;
  return { ...changed(base, plan), from, selected: 0, unopened: [], opened: opened.names };
}

function undone(state: State): State {
  const version = state.past.at(-1);
  if (version === undefined) return state;
  return within({
    ...state,
    ...version,
    past: state.past.slice(0, -1),
    future: [versionOf(state), ...state.future],
    typing: null,
  });
}

function redone(state: State): State {
  const [version, ...future] = state.future;
  if (version === undefined) return state;
  return within({ ...state, ...version, past: [...state.past, versionOf(state)], future, typing: null });
}

function within(state: State): State {
  return { ...state, selected: Math.min(state.selected, state.plan.increments.length - 1) };
}
