/** Opens the files a person chose: all of them or, where one is refused, none. */
import { problemsOf, type Card, type Clinic, type Data, type Plan, type Problem, type ReadAnswer } from "./types";
import { words } from "./words/index";

/** A little over the engine's own limit, so that the engine is the one to say that a file is too large. */
const MOST_READ = 1_200_000;
const CARDS = new Set(["lamp", "composite", "adhesive", "liner"]);

export interface Opened {
  readonly plan: Plan | null;
  readonly cards: readonly Card[];
  readonly clinic: Clinic | null;
  readonly names: readonly string[];
}

export type Reader = (name: string, text: string) => Promise<ReadAnswer>;

export async function openFiles(
  files: readonly File[],
  read: Reader,
): Promise<Opened | { readonly problems: readonly Problem[] }> {
  const problems: Problem[] = [];
  const plans: Plan[] = [];
  const cards: Card[] = [];
  let clinic: Clinic | null = null;
  for (const file of files) {
    const text = await textOf(file);
    if (text === null) {
      problems.push(said(file.name, words.files.notText));
      continue;
    }
    const answer = await read(file.name, text);
    if (!answer.ok) problems.push(...problemsOf(answer));
    else if (answer.kind === "plan") plans.push(answer.data as Plan);
    else if (CARDS.has(answer.kind)) cards.push(answer.data as Card);
    else if (answer.kind === "clinic") clinic = answer.data as Data;
    else problems.push(said(file.name, words.files.notForHere(answer.kind)));
  }
  if (plans.length > 1) problems.push(said(files.map((file) => file.name).join(", "), words.files.twoPlans));
  if (problems.length > 0) return { problems };
  return { plan: plans[0] ?? null, cards, clinic, names: files.map((file) => file.name) };
}

async function textOf(file: File): Promise<string | null> {
  const bytes = await file.slice(0, MOST_READ).arrayBuffer();
  try {
    return new TextDecoder("utf-8", { fatal: file.size <= MOST_READ }).decode(bytes);
  } catch {
    return null;
  }
}

function said(file: string, message: string): Problem {
  return { file, line: 0, column: 0, path: [], message, text: "", shown: `${file}: ${message}` };
}

/** Hands a text to the person as a file. */
export function saveText(name: string, text: string): void {
  const link = document.createElement("a");
  link.href = URL.createObjectURL(new Blob([text], { type: "application/yaml" }));
  link.download = name;
  link.click();
  setTimeout(() => URL.revokeObjectURL(link.href), 10_000);
}

/** A file's name from a plan's title: plain letters and hyphens. */
export function fileName(title: string): string {
  const plain = title
    .normalize("NFKD")
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, "-")
    .replace(/^-+|-+$/g, "")
    .slice(0, 60);
  return `${plain || "plan"}.yaml`;
}
