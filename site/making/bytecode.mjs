/**
 * Compiles a folder of Python to one zip of bytecode, by the Python that the browser will run.
 *
 *   node bytecode.mjs SOURCE_FOLDER KEPT_FOLDER OUT.zip
 *
 * KEPT_FOLDER holds what was compiled before, so that a change costs only its own files.
 */
import { readFileSync } from "node:fs";
import { basename, dirname, resolve } from "node:path";
import { loadPyodide } from "pyodide";

const [source, kept, out] = process.argv.slice(2).map((name) => resolve(name));

// A set's order depends on the hash seed, and with it the bytes: one seed, one result.
const python = await loadPyodide({ env: { PYTHONHASHSEED: "0", HOME: "/home" } });
const { FS } = python;
for (const [at, root] of [["/source", source], ["/kept", kept], ["/out", dirname(out)]]) {
  FS.mkdirTree(at);
  FS.mount(FS.filesystems.NODEFS, { root }, at);
}

python.runPython(readFileSync(new URL("bytecode.py", import.meta.url), "utf8"));
const count = python.globals.get("write_zip")("/source", "/kept", `/out/${basename(out)}`);
console.log(`${count} files`);
