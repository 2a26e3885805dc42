/** Reading and changing one place in a plan; a change gives a new plan and leaves the old one as it was. */
import type { Data, Json, Path } from "./types";

export function at(data: Json | undefined, path: Path): Json | undefined {
  let here: Json | undefined = data;
  for (const step of path) {
    if (here === null || typeof here !== "object") return undefined;
    here = (here as Record<string, Json | undefined>)[String(step)];
  }
  return here;
}

/** The data with another value at the path; undefined takes the key away. Missing steps are made on the way. */
export function put<T extends Json>(data: T, path: Path, value: Json | undefined): T {
  const [step, ...rest] = path;
  if (step === undefined) return value as T;
  if (Array.isArray(data)) {
    const list = [...(data as readonly Json[])];
    list[Number(step)] = put(list[Number(step)] ?? {}, rest, value);
    return list as unknown as T;
  }
  const next: Record<string, Json | undefined> = { ...((data ?? {}) as Data) };
  if (rest.length === 0 && value === undefined) delete next[String(step)];
  else next[String(step)] = rest.length === 0 ? value : put(nest(next[String(step)], rest[0]), rest, value);
  return next as unknown as T;
}

/** Something that can hold the next step: what is there, or an empty list or record. */
function nest(here: Json | undefined, step: string | number | undefined): Json {
  if (here !== null && typeof here === "object") return here;
  return typeof step === "number" ? [] : {};
}

export function samePath(one: Path, other: Path): boolean {
  return one.length === other.length && one.every((step, index) => String(step) === String(other[index]));
}
