/** The fields of a plan that a person may set, group by group: where each stands and how it is entered. */
import type { Path } from "./types";
import type { FieldName } from "./words/index";

export interface Field {
  readonly name: FieldName;
  readonly kind: "number" | "choice" | "answer" | "many" | "text" | "date";
  /** What one press of a stepper's button adds. */
  readonly step: number;
  /** Where the stepper starts when nothing has been entered. */
  readonly start: number;
  /** Whether the plan may say nothing here. */
  readonly optional: boolean;
  /** The words to choose from where the schema leaves them to a table. */
  readonly options?: readonly string[];
}

/** Lights of the room, by their ids in rules/tables/room-lights.yaml. */
export const ROOM_LIGHTS = ["operating-light-led", "halogen", "fluorescent", "window"] as const;
/** What an exposure may pass first. */
const LAYERS = ["glass-ceramic", "enamel", "dentine", "strip"] as const;

const number = (name: FieldName, step: number, start: number, optional = false): Field => ({
  name,
  kind: "number",
  step,
  start,
  optional,
});
const other = (name: FieldName, kind: Field["kind"], optional = true): Field => ({
  name,
  kind,
  step: 1,
  start: 0,
  optional,
});

export const INCREMENT_FIRST: readonly Field[] = [number("thickness_mm", 0.5, 2)];

export const INCREMENT_MORE: readonly Field[] = [
  number("composite_temperature_c", 1, 23, true),
  number("placing_s", 5, 40, true),
  number("dispensed_s", 10, 30, true),
  number("undercut_mm", 0.1, 0, true),
  other("cover", "choice"),
];

export const EXPOSURE_FIRST: readonly Field[] = [number("time_s", 5, 20), number("tilt_deg", 5, 0, true)];

export const EXPOSURE_MORE: readonly Field[] = [
  number("aim_offset_mm", 0.5, 0, true),
  number("tip_distance_mm", 0.5, 2, true),
  number("rest_before_s", 5, 5, true),
  other("air", "choice"),
  other("from", "choice"),
  other("side", "choice"),
];

export const THROUGH: readonly Field[] = [
  { ...other("what", "choice", false), options: LAYERS },
  number("thickness_mm", 0.5, 1, true),
  number("transmittance_share", 0.05, 0.5, true),
];

export const CAVITY: readonly { readonly path: Path; readonly field: Field }[] = [
  { path: ["cavity"], field: number("depth_mm", 0.5, 4) },
  { path: ["cavity"], field: number("width_mm", 0.5, 4) },
  { path: [], field: number("gap_mm", 0.5, 2) },
  { path: ["cavity"], field: number("remaining_dentine_mm", 0.1, 2, true) },
  { path: ["cavity"], field: other("margin", "choice") },
  { path: ["cavity"], field: number("soft_tissue_mm", 1, 8, true) },
  { path: [], field: other("site", "choice") },
  { path: [], field: other("matrix", "choice") },
  { path: [], field: other("pulp_protection", "choice") },
  { path: [], field: other("perfusion", "choice") },
  { path: [], field: other("on", "date") },
];

export const SOURCE: readonly Field[] = [
  { ...other("what", "choice", false), options: ROOM_LIGHTS },
  number("illuminance_lx", 1000, 8000),
  other("filter", "choice"),
];

export const TEAM: readonly Field[] = [
  other("filters_for", "many"),
  number("filter_transmittance_share", 0.0005, 0.001, true),
  number("exposures_today_count", 1, 20, true),
  other("loupes", "answer"),
  other("light_sensitive", "choice"),
  other("eye_condition", "choice"),
];
