/** The files a person chose, as text for the engine; and a plan's text as a file for the person. */
import type { Problem } from "./types";
import { words } from "./words/index";

/** A little over the engine's own limit, so that the engine is the one to say that a file is too large. */
const MOST_READ = 1_200_000;

export interface Texts {
  readonly texts: readonly { readonly name: string; readonly text: string }[];
  /** The files that are no text at all. */
  readonly problems: readonly Problem[];
}

export async function textsOf(files: readonly File[]): Promise<Texts> {
  const texts = [];
  const problems = [];
  for (const file of files) {
    const text = await textOf(file);
    if (text === null) problems.push(notText(file.name));
    else texts.push({ name: file.name, text });
  }
  return { texts, problems };
}

async function textOf(file: File): Promise<string | null> {
  const bytes = await file.slice(0, MOST_READ).arrayBuffer();
  try {
    return new TextDecoder("utf-8", { fatal: file.size <= MOST_READ }).decode(bytes);
  } catch {
    return null;
  }
}

function notText(file: string): Problem {
  const message = words.files.notText;
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
