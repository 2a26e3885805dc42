/** Findings of one rule and one severity, put together for display; each keeps its own words and figure. */
import type { Finding, Mark } from "./types";

export interface Group {
  readonly key: string;
  readonly mark: Mark;
  readonly findings: readonly [Finding, ...Finding[]];
}

/** In the report's order; a group stands where its first finding stood. */
export function grouped(findings: readonly Finding[]): readonly Group[] {
  const groups = new Map<string, [Finding, ...Finding[]]>();
  for (const finding of findings) {
    const key = `${finding.finding} ${finding.rule}`;
    const group = groups.get(key);
    if (group === undefined) groups.set(key, [finding]);
    else group.push(finding);
  }
  return [...groups].map(([key, group]) => ({ key, mark: group[0].finding, findings: group }));
}

/** The texts without repeats, in order. */
export function distinct(texts: readonly (string | null)[]): readonly string[] {
  return [...new Set(texts.filter((text): text is string => text !== null && text !== ""))];
}
