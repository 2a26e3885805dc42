/** The catalogue in use. Another language is another file of the same type; the build fails on a missing word. */
import { en } from "./en";

export type Words = typeof en;
export type FieldName = keyof Words["fields"];

export const words: Words = en;

/** The word for a value out of a file, or the value itself where it is not one of ours. */
export function optionWord(name: FieldName, value: string): string {
  const own: Readonly<Record<string, string>> = words.options;
  return own[`${name}:${value}`] ?? own[value] ?? value;
}
