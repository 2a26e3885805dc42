/** What the plan's published schema allows at a place: the range of a number, the words of a choice. */
import common from "../../rules/schema/v1/common.json";
import plan from "../../rules/schema/v1/plan.json";
import type { Path } from "./types";

interface Schema {
  readonly $ref?: string;
  readonly $defs?: Record<string, Schema>;
  readonly properties?: Record<string, Schema>;
  readonly items?: Schema;
  readonly oneOf?: readonly Schema[];
  readonly anyOf?: readonly Schema[];
  readonly allOf?: readonly Schema[];
  readonly enum?: readonly unknown[];
  readonly const?: unknown;
  readonly default?: unknown;
  readonly minimum?: number;
  readonly maximum?: number;
  readonly exclusiveMinimum?: number;
  readonly exclusiveMaximum?: number;
}

export interface Range {
  readonly least: number;
  readonly most: number;
  /** Whether the least value itself is too small. */
  readonly above: boolean;
}

const ROOT = plan as unknown as Schema;
const COMMON = common as unknown as Schema;

/** The range of the number at a path; unbounded where the schema sets none. */
export function rangeAt(path: Path): Range {
  const found = schemasAt(path);
  const pick = (key: "minimum" | "maximum" | "exclusiveMinimum") =>
    found.map((schema) => schema[key]).find((value) => value !== undefined);
  const above = pick("exclusiveMinimum");
  return {
    least: above ?? pick("minimum") ?? -Infinity,
    most: pick("maximum") ?? Infinity,
    above: above !== undefined,
  };
}

export function inRange(value: number, range: Range): boolean {
  return value <= range.most && (range.above ? value > range.least : value >= range.least);
}

/** The words a choice at the path may take, in the schema's order. */
export function choicesAt(path: Path): readonly string[] {
  const words = schemasAt(path).flatMap((schema) => [
    ...(schema.enum ?? []),
    ...(schema.const === undefined ? [] : [schema.const]),
  ]);
  return words.filter((word): word is string => typeof word === "string");
}

/** The number or word that counts where the plan says nothing, if the schema names one. */
export function defaultAt(path: Path): number | string | undefined {
  return schemasAt(path)
    .map((schema) => schema.default)
    .find((value): value is number | string => typeof value === "number" || typeof value === "string");
}

/** Every schema that speaks of the place, through references and alternatives. */
function schemasAt(path: Path): readonly Schema[] {
  let here = opened(ROOT);
  for (const step of path) {
    here = here
      .map((schema) => (typeof step === "number" ? schema.items : schema.properties?.[step]))
      .filter((schema) => schema !== undefined)
      .flatMap(opened);
  }
  return here;
}

function opened(schema: Schema): readonly Schema[] {
  const target = schema.$ref === undefined ? [] : opened(referred(schema.$ref));
  const inside = [...(schema.oneOf ?? []), ...(schema.anyOf ?? []), ...(schema.allOf ?? [])];
  return [schema, ...target, ...inside.flatMap(opened)];
}

function referred(reference: string): Schema {
  const name = reference.split("/").at(-1) ?? "";
  return (reference.startsWith("#") ? ROOT : COMMON).$defs?.[name] ?? {};
}
