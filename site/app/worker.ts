/** The engine's thread: starts Python, then answers each text with the bridge's text. */
import { loadPyodide } from "pyodide";
import { info } from "pyodide/pyodide-lock.json";
import type { FromWorker, ToWorker } from "./messages";

declare const PYODIDE_FOLDER: string; // both are written in by site/making/bundle.py
declare const ENGINE_ZIP: string;

/** All that Python needs is in the one zip, so the list of packages is empty; its head must name the exact build. */
const NO_PACKAGES = JSON.stringify({ info, packages: {} });

const say = (message: FromWorker) => self.postMessage(message);
const besideThis = (name: string) => new URL(name, import.meta.url).href;

async function start(): Promise<(text: string) => string> {
  say({ step: "python" });
  const python = await loadPyodide({
    indexURL: besideThis(PYODIDE_FOLDER),
    stdLibURL: besideThis(ENGINE_ZIP),
    lockFileContents: NO_PACKAGES,
    packageBaseUrl: besideThis(PYODIDE_FOLDER),
  });
  say({ step: "engine" });
  const bridge = python.pyimport("farside.bridge");
  say({ step: "ready" });
  return bridge.call;
}

self.addEventListener("securitypolicyviolation", (event) => {
  say({ trouble: "policy", detail: `${event.effectiveDirective}: ${event.blockedURI}` });
});

const started = start();
started.catch((error: unknown) => say({ trouble: "start", detail: String(error) }));

self.addEventListener("message", async (event: MessageEvent<ToWorker>) => {
  const { id, text } = event.data;
  try {
    const call = await started;
    say({ id, text: call(text) });
  } catch (error) {
    say({ id, failed: String(error) });
  }
});
