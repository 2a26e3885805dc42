/** What can be done with the whole plan: choose or open one, take a step back or forth, read how, change the light. */
import { look } from "../look";
import { words } from "../words/index";
import type { Part } from "./field";
import { SignButton } from "./sign-button";

export function Tools({ state, send, offline }: Part & { readonly offline: boolean }) {
  return (
    <div class="tools">
      <button type="button" class="main" onClick={() => send({ is: "files", shown: true })}>
        {words.tools.files}
      </button>
      <SignButton
        name={words.tools.undo}
        sign="undo"
        disabled={state.past.length === 0}
        onClick={() => send({ is: "undo" })}
      />
      <SignButton
        name={words.tools.redo}
        sign="redo"
        disabled={state.future.length === 0}
        onClick={() => send({ is: "redo" })}
      />
      <span class="gap">{offline && <span class="offline">{words.update.offline}</span>}</span>
      <a class="button" href="how-to-use/">
        {words.tools.help}
      </a>
      <SignButton name={words.tools.look} sign="look" onClick={look} />
    </div>
  );
}
