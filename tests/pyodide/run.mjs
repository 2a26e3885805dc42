/**
 * Runs pytest inside Pyodide on folders of this machine.
 *
 *   node run.mjs CHECKOUT PACKAGES RESULTS.xml PYTEST_ARGUMENT...
 */
import { createRequire } from "node:module";
import { basename, dirname, resolve } from "node:path";
import { pathToFileURL } from "node:url";

const [checkout, packages, results, ...given] = process.argv.slice(2);
const from = createRequire(resolve(checkout, "site", "package.json"));
const { loadPyodide } = await import(pathToFileURL(from.resolve("pyodide/pyodide.mjs")).href);

const python = await loadPyodide({ env: { HOME: "/home", PYTHONDONTWRITEBYTECODE: "1" } });
function mount(folder, at) {
  python.FS.mkdirTree(at);
  python.FS.mount(python.FS.filesystems.NODEFS, { root: folder }, at);
}
mount(checkout, "/farside");
mount(packages, "/packages");
mount(dirname(results), "/results");

python.globals.set("given", python.toPy(given));
python.globals.set("results", basename(results));
try {
  process.exitCode = python.runPython(`
import os, sys
sys.path.insert(0, "/packages")
import pytest

print(f"Python {sys.version.split()[0]} on {sys.platform}")
os.chdir("/farside")
int(pytest.main(["--quiet", "-p", "no:cacheprovider", f"--junit-xml=/results/{results}", *given]))
`);
} catch (error) {
  console.error(error.message); // without the stack, which shows Pyodide's one long line of source
  process.exitCode = 1;
}
