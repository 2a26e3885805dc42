/** What passes between the page and the engine's thread. */

/** Where a start has got to. */
export type Step = "python" | "engine" | "ready";

/** Why the engine cannot start or answer; the page has the words for each. */
export type TroubleKind =
  | "no-webassembly" // the browser cannot run it
  | "no-worker" // the thread's own script did not load
  | "file-missing" // a file of the engine cannot be had: detail names it
  | "wrong-type" // the server gives the wasm file another type than application/wasm
  | "policy" // the page's policy forbids something the engine needs
  | "start" // Python or the engine failed as it started
  | "silent"; // every file is there, and still nothing is heard

export interface Trouble {
  trouble: TroubleKind;
  /** For whoever looks into it; not a sentence for the user. */
  detail: string;
}

export interface ToWorker {
  id: number;
  text: string;
}

export type FromWorker = { step: Step } | Trouble | { id: number; text: string } | { id: number; failed: string };
