/** What can be done with the whole plan: choose or open one, take a step back or forth, read how, change the light. */
import { look } from "../look";
import { words } from "../words/index";
import type { Part } from "./field";
import { Icon } from "./icon";

export function Tools({ state, send, offline }: Part & { readonly offline: boolean }) {
  return (
    <div class="tools">
      <button type="button" class="main" onClick={() => send({ is: "files", shown: true })}>
        {words.tools.files}
      </button>
      <button
        type="button"
        class="sign"
        aria-label={words.tools.undo}
        title={words.tools.undo}
        disabled={state.past.length === 0}
        onClick={() => send({ is: "undo" })}
      >
        <Icon name="undo" />
      </button>
      <button
        type="button"
        class="sign"
        aria-label={words.tools.redo}
        title={words.tools.redo}
        disabled={state.future.length === 0}
        onClick={() => send({ is: "redo" })}
      >
        <Icon name="redo" />
      </button>
      <span class="gap">{offline && <span class="offline">{words.update.offline}</span>}</span>
      <a class="button" href="how-to-use/">
        {words.tools.help}
      </a>
      <button type="button" class="sign" aria-label={words.tools.look} title={words.tools.look} onClick={look}>
        <Icon name="look" />
      </button>
    </div>
  );
}
