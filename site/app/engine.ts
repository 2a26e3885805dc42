/** The engine as the page sees it: ask it something, be told how its start goes and what is wrong. */
import type { FromWorker, Step, Trouble, TroubleKind } from "./messages";

export type { Step, Trouble, TroubleKind } from "./messages";

export interface EngineListener {
  /** The start has got further; "ready" comes once. */
  step?(step: Step): void;
  /** Nothing has been heard for a while, and no fault was found: a slow network, most likely. */
  slow?(): void;
  /** The engine will not come, or has gone. */
  trouble?(trouble: Trouble): void;
}

export interface Engine {
  /** Answers one request to the bridge. Rejects only where the engine itself has failed. */
  call<Answer>(request: object): Promise<Answer>;
  /** As call, for values that change under the hand: a request still waiting when a newer one comes is answered undefined. */
  latest<Answer>(request: object): Promise<Answer | undefined>;
  /** Ends the thread; whatever still waits is rejected. */
  stop(): void;
}

interface Waiting {
  resolve(text: string): void;
  reject(error: Error): void;
}

interface Next {
  request: object;
  resolve(answer: unknown): void;
  reject(error: Error): void;
}

/** How long the start may be silent before the watchdog looks for the cause. */
const PATIENCE_MS = 15_000;
/** How often the watchdog looks and finds every file there before it gives up. */
const LOOKS = 8;

const assets = new URL("./", import.meta.url);

declare const ENGINE_FILES: readonly string[]; // beside this script; written in by site/making/bundle.py

/** Starts the engine in its own thread. */
export function startEngine(listener: EngineListener = {}): Engine {
  const waiting = new Map<number, Waiting>();
  let count = 0;
  let gone: Error | undefined;
  let busy = false;
  let next: Next | undefined;

  const worker = new Worker(new URL("worker.js", assets), { type: "module" });
  const watchdog = watch(listener.slow ?? (() => {}), fail);

  function fail(trouble: Trouble): void {
    if (gone) return;
    stop(new Error(`${trouble.trouble}: ${trouble.detail}`));
    listener.trouble?.(trouble);
  }

  function stop(why: Error): void {
    gone ??= why;
    watchdog.rest();
    worker.terminate();
    for (const { reject } of waiting.values()) reject(gone);
    waiting.clear();
    next?.reject(gone);
    next = undefined;
  }

  worker.addEventListener("error", (event) => {
    event.preventDefault();
    fail({ trouble: "no-worker", detail: event.message ?? "" });
  });

  worker.addEventListener("message", ({ data }: MessageEvent<FromWorker>) => {
    if ("step" in data) {
      watchdog.heard();
      if (data.step === "ready") watchdog.rest();
      listener.step?.(data.step);
    } else if ("trouble" in data) {
      fail(data);
    } else {
      const asked = waiting.get(data.id);
      waiting.delete(data.id);
      if ("text" in data) asked?.resolve(data.text);
      else asked?.reject(new Error(data.failed));
    }
  });

  async function call<Answer>(request: object): Promise<Answer> {
    if (gone) throw gone;
    const id = ++count;
    const text = await new Promise<string>((resolve, reject) => {
      waiting.set(id, { resolve, reject });
      worker.postMessage({ id, text: JSON.stringify(request) });
    });
    return JSON.parse(text) as Answer;
  }

  async function sendNext(): Promise<void> {
    while (next && !gone) {
      const { request, resolve, reject } = next;
      next = undefined;
      busy = true;
      await call(request).then(resolve, reject);
      busy = false;
    }
  }

  function latest<Answer>(request: object): Promise<Answer | undefined> {
    if (gone) return Promise.reject(gone);
    return new Promise((resolve, reject) => {
      next?.resolve(undefined);
      next = { request, resolve: resolve as (answer: unknown) => void, reject };
      if (!busy) void sendNext();
    });
  }

  return { call, latest, stop: () => stop(new Error("stopped")) };
}

/** Looks for the cause whenever a start stays silent, and says so: a blocked file would else hang it without a word. */
function watch(slow: () => void, fail: (trouble: Trouble) => void) {
  let looks = 0;
  let timer: ReturnType<typeof setTimeout> | undefined;

  async function look(): Promise<void> {
    const found = await fault();
    if (timer === undefined) return;
    looks += 1;
    if (found) fail(found);
    else if (looks >= LOOKS) fail({ trouble: "silent", detail: `${(looks * PATIENCE_MS) / 1000} s` });
    else {
      slow();
      heard();
    }
  }

  function heard(): void {
    clearTimeout(timer);
    timer = setTimeout(() => void look(), PATIENCE_MS);
  }

  function rest(): void {
    clearTimeout(timer);
    timer = undefined;
  }

  heard();
  return { heard, rest };
}

/** What keeps the engine from starting, as far as the page can see. */
async function fault(): Promise<Trouble | undefined> {
  if (typeof WebAssembly !== "object") return { trouble: "no-webassembly", detail: navigator.userAgent };
  for (const name of ENGINE_FILES) {
    const found = await fileFault(name);
    if (found) return found;
  }
  return undefined;
}

async function fileFault(name: string): Promise<Trouble | undefined> {
  const trouble = (kind: TroubleKind, detail: string): Trouble => ({ trouble: kind, detail: `${name}: ${detail}` });
  try {
    const answer = await fetch(new URL(name, assets)); // not HEAD: a service worker answers only GET
    void answer.body?.cancel();
    if (!answer.ok) return trouble("file-missing", String(answer.status));
    const type = answer.headers.get("content-type") ?? "none";
    if (name.endsWith(".wasm") && !type.startsWith("application/wasm")) return trouble("wrong-type", type);
  } catch (error) {
    return trouble("file-missing", String(error));
  }
  return undefined;
}
