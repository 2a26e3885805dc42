/**
 * Compiles a folder of Python to one zip of bytecode, by the Python that the browser will run.
 *
 *   node bytecode.mjs SOURCE_FOLDER OUT.zip
 */
import { readFileSync } from "node:fs";
import { resolve } from "node:path";
import { loadPyodide } from "pyodide";

const [source, out] = process.argv.slice(2).map((name) => resolve(name));

// A set's order depends on the hash seed, and with it the bytes: one seed, one result.
const python = await loadPyodide({ env: { PYTHONHASHSEED: "0", HOME: "/home" } });
const { FS } = python;
FS.mkdirTree("/source");
FS.mount(FS.filesystems.NODEFS, { root: source }, "/source");
FS.mkdirTree("/out");
FS.mount(FS.filesystems.NODEFS, { root: resolve(out, "..") }, "/out");

python.runPython(readFileSync(new URL("bytecode.py", import.meta.url), "utf8"));
const count = python.globals.get("write_zip")("/source", `/out/${out.split(/[\\/]/).pop()}`);
console.log(`${count} files`);
