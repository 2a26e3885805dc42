/** Plans and files: the example clinic's plans, opening and saving, and why a file was not opened. */
import { useEffect, useRef } from "preact/hooks";
import type { Problem } from "../types";
import { words } from "../words/index";
import type { Part } from "./field";

interface FilesProps extends Part {
  readonly onOpen: (files: readonly File[]) => void;
  readonly onSave: () => void;
  readonly onForget: () => void;
  readonly offline: boolean;
}

export function Files({ state, send, onOpen, onSave, onForget, offline }: FilesProps) {
  const dialog = useRef<HTMLDialogElement>(null);
  useEffect(() => {
    const box = dialog.current;
    if (box === null || box.open === state.filesShown) return;
    if (state.filesShown) box.showModal();
    else box.close();
  }, [state.filesShown]);
  const close = () => send({ is: "files", shown: false });
  return (
    <dialog ref={dialog} class="files" aria-labelledby="files-title" onClose={() => state.filesShown && close()}>
      <div class="files-head">
        <h2 id="files-title">{words.files.title}</h2>
        <button type="button" onClick={close}>
          {words.files.close}
        </button>
      </div>
      <Unopened problems={state.unopened} />
      {state.opened.length > 0 && (
        <p class="opened" role="status">
          {words.files.opened(state.opened)}
        </p>
      )}
      <div class="files-do">
        <label class={state.start === null ? "button main off" : "button main"}>
          {words.files.open}
          <input
            class="unseen"
            type="file"
            multiple
            accept=".yaml,.yml,.json"
            disabled={state.start === null}
            onChange={(event) => {
              onOpen([...(event.currentTarget.files ?? [])]);
              event.currentTarget.value = "";
            }}
          />
        </label>
        <button type="button" onClick={() => send({ is: "new" })}>
          {words.files.newPlan}
        </button>
        <button type="button" disabled={state.start === null} onClick={onSave}>
          {words.files.save}
        </button>
        <button type="button" class="quiet" onClick={onForget}>
          {words.files.forget}
        </button>
      </div>
      <p class="hint">{state.start === null ? words.files.waiting : words.files.openHint}</p>
      {offline && <p class="hint">{words.update.offline}.</p>}
      <h3>{words.files.examples}</h3>
      <p class="hint">{words.files.invented}</p>
      <ul class="examples">
        {(state.start?.plans ?? []).map(({ name, data }) => (
          <li key={name}>
            <button type="button" onClick={() => send({ is: "example", name })}>
              {data.title}
            </button>
          </li>
        ))}
      </ul>
    </dialog>
  );
}

/** The engine's placed messages, as plain text. */
function Unopened({ problems }: { readonly problems: readonly Problem[] }) {
  if (problems.length === 0) return null;
  return (
    <div class="refusal" role="alert">
      <h3>{words.files.refusedTitle(problems.length)}</h3>
      {problems.map((problem, index) => (
        <pre key={index}>{problem.shown}</pre>
      ))}
    </div>
  );
}
