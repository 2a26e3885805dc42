/**
 * Bundles the page's script and the engine's thread.
 *
 *   node bundle.mjs PAGE_ENTRY WORKER_ENTRY OUT_FOLDER '{"NAME": value}'
 */
import { build } from "esbuild";

const [app, worker, outdir, names] = process.argv.slice(2);

await build({
  entryPoints: { app, worker },
  outdir,
  bundle: true,
  minify: true,
  format: "esm",
  target: "es2022",
  jsx: "automatic",
  jsxImportSource: "preact",
  external: ["node:*"], // Pyodide asks for these only under Node
  define: Object.fromEntries(Object.entries(JSON.parse(names)).map(([name, value]) => [name, JSON.stringify(value)])),
  logLevel: "warning",
});
